"use client";

import { PaletteSwatch } from "@/components/stock/palette-swatch";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { SelectField } from "@/components/ui/select-field";
import { Skeleton } from "@/components/ui/skeleton";
import { formatKg } from "@/lib/core/mass";
import type { ColourStock } from "@/lib/production/contract/plans";
import { moveShare, WHOLE } from "@/lib/production/rules/blend";
import { MOST_COLOURS } from "@/lib/production/terms";
import { BlendPicture } from "./blend-picture";
import type { PlanForm } from "./plan-form";
import { ShareRow } from "./share-row";

type Props = {
  form: PlanForm;
  /** null while the stock is read. */
  colours: readonly ColourStock[] | null;
  error: boolean;
  onChange: (form: PlanForm) => void;
};

/** The blend: its picture, how much it is folded, a share for each colour. */
export function BlendEditor({ form, colours, error, onChange }: Props) {
  const set = (part: Partial<PlanForm>) => onChange({ ...form, ...part });
  if (!colours) {
    return error ? (
      <Notice tone="bad" title="No stock" live="status">
        The server does not answer, so what is free cannot be shown. It is asked again by itself.
      </Notice>
    ) : (
      <Skeleton shape="table" count={4} label="Loading the colours" />
    );
  }
  const known = form.shares.flatMap((share) => {
    const colour = colours.find(({ code }) => code === share.colourCode);
    return colour ? [{ share, colour }] : [];
  });
  const others = colours.filter(
    ({ code }) => !form.shares.some(({ colourCode }) => colourCode === code),
  );
  const add = (colourCode: string) => {
    const shares = [...form.shares, { colourCode, thousandths: 0 }];
    const part = Math.round(WHOLE / shares.length);
    set({ shares: moveShare(shares, colourCode, shares.length === 1 ? WHOLE : part) });
  };
  const remove = (colourCode: string) =>
    set({
      shares: moveShare(form.shares, colourCode, 0).filter(
        (share) => share.colourCode !== colourCode,
      ),
    });
  return (
    <section aria-label="Blend">
      <BlendPicture
        colours={known.map(({ share, colour }) => ({ ...colour, ...share }))}
        folded={form.folded}
        seed={form.seed}
      />
      <div className="mt-1 mb-3 flex flex-wrap items-center justify-between gap-x-4 text-sm text-soft">
        <span>Blend, drawn</span>
        <label className="flex min-h-11 items-center gap-2.5">
          Folded: a little
          <input
            type="range"
            min={0}
            max={100}
            value={form.folded}
            onChange={(event) => set({ folded: Number(event.target.value) })}
            aria-label="How much it is folded"
            className="h-11 w-28 accent-ink"
          />
          a lot
        </label>
        <Button
          variant="quiet"
          size="small"
          onClick={() => set({ seed: (Math.imul(form.seed, 1_664_525) + 1_013_904_223) >>> 0 })}
        >
          Draw it anew
        </Button>
      </div>
      <ul className="grid">
        {known.map(({ share, colour }) => (
          <ShareRow
            key={colour.code}
            name={colour.name}
            swatch={<PaletteSwatch hex={colour.hex} look={colour.look} size={28} />}
            thousandths={share.thousandths}
            onShare={(thousandths) =>
              set({ shares: moveShare(form.shares, colour.code, thousandths) })
            }
            onRemove={() => remove(colour.code)}
          />
        ))}
      </ul>
      {form.shares.length < MOST_COLOURS && others.length > 0 ? (
        <SelectField
          label={form.shares.length === 0 ? "First colour" : "Another colour"}
          value=""
          onChange={(event) => {
            if (event.target.value) add(event.target.value);
          }}
          placeholder="Choose a colour"
          options={others.map(({ code, name, freeGrams }) => ({
            value: code,
            label: `${name}, ${formatKg(freeGrams)} kg free`,
          }))}
          className="mt-3 max-w-sm"
        />
      ) : null}
    </section>
  );
}
