"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import {
  orderColoursEndpoint,
  restoreColourEndpoint,
  retireColourEndpoint,
  type Colour,
} from "@/lib/stock/contract/palette";
import { PaletteClosePairs } from "./palette-close-pairs";
import { PaletteDialog } from "./palette-dialog";
import { PaletteRow } from "./palette-row";

/** The colours that plastic is sorted into: add, change, order, retire. */
export function PaletteManager({ colours }: { colours: readonly Colour[] }) {
  const router = useRouter();
  const [editing, setEditing] = useState<Colour | "new" | null>(null);
  const [moved, setMoved] = useState("");
  const order = useCommand(orderColoursEndpoint);
  const retire = useCommand(retireColourEndpoint);
  const restore = useCommand(restoreColourEndpoint);
  const open = colours.filter((colour) => colour.retiredAt === null);
  const retired = colours.filter((colour) => colour.retiredAt !== null);
  const busy = order.pending || retire.pending || restore.pending;

  const move = async (at: number, by: 1 | -1) => {
    const codes = open.map((colour) => colour.code);
    const [here, there] = [codes[at], codes[at + by]];
    if (here === undefined || there === undefined) return;
    codes[at] = there;
    codes[at + by] = here;
    const result = await order.send({ codes });
    if (result.kind !== "done") return;
    setMoved(`${open[at]?.name ?? ""} is now number ${at + by + 1}.`);
    router.refresh();
  };
  const setRetired = async (colour: Colour, gone: boolean) => {
    const result = await (gone ? retire : restore).send({ code: colour.code });
    if (result.kind === "done") router.refresh();
  };

  return (
    <>
      <PageHeader
        title="Palette"
        titleInBar
        lead="The colours that plastic is sorted into, in the order in which screens offer them. A retired colour is not offered any more; its stock stays."
        actions={<Button onClick={() => setEditing("new")}>Add a colour</Button>}
      />
      <div className="mb-3 grid gap-3 empty:hidden">
        <CommandNotice command={order} />
        <CommandNotice command={retire} />
        <CommandNotice command={restore} />
      </div>
      <p role="status" className="sr-only">
        {moved}
      </p>
      <PaletteClosePairs colours={open} />
      {colours.length === 0 ? (
        <EmptyState title="No colour yet">Add the colours that the shed sorts into.</EmptyState>
      ) : (
        <ol className="grid max-w-3xl gap-2">
          {open.map((colour, at) => (
            <PaletteRow
              key={colour.code}
              colour={colour}
              busy={busy}
              onChange={() => setEditing(colour)}
              onRetire={() => void setRetired(colour, true)}
              onUp={at === 0 ? null : () => void move(at, -1)}
              onDown={at === open.length - 1 ? null : () => void move(at, 1)}
            />
          ))}
        </ol>
      )}
      {retired.length === 0 ? null : (
        <section aria-label="Retired colours" className="mt-8 max-w-3xl">
          <h2 className="mb-3 text-xl">Retired</h2>
          <ul className="grid gap-2">
            {retired.map((colour) => (
              <PaletteRow
                key={colour.code}
                colour={colour}
                busy={busy}
                onChange={() => setEditing(colour)}
                onRestore={() => void setRetired(colour, false)}
              />
            ))}
          </ul>
        </section>
      )}
      {editing === null ? null : (
        <PaletteDialog
          colour={editing === "new" ? null : editing}
          onClose={() => setEditing(null)}
          onSaved={() => {
            setEditing(null);
            router.refresh();
          }}
        />
      )}
    </>
  );
}
