"use client";

import { useState, type ReactNode } from "react";
import { Icon } from "@/components/ui/icon";

type Props = {
  name: string;
  swatch: ReactNode;
  thousandths: number;
  onShare: (thousandths: number) => void;
  onRemove: () => void;
};

/** One colour's share: by slider and by number. */
export function ShareRow({ name, swatch, thousandths, onShare, onRemove }: Props) {
  /** While it is typed; null: the share itself is shown. */
  const [typed, setTyped] = useState<string | null>(null);
  const shown = typed ?? String(thousandths / 10);
  return (
    <li className="grid grid-cols-[1.75rem_minmax(0,1fr)_auto_auto] items-center gap-x-3 border-t border-rule py-1.5 last:border-b wide:grid-cols-[1.75rem_8rem_minmax(0,1fr)_auto_auto]">
      <span aria-hidden className="size-7 overflow-hidden rounded-plate border border-rule">
        {swatch}
      </span>
      <span className="min-w-0 font-bold wrap-anywhere">{name}</span>
      <input
        type="range"
        min={0}
        max={1000}
        step={10}
        value={thousandths}
        onChange={(event) => {
          setTyped(null);
          onShare(Number(event.target.value));
        }}
        aria-label={`Share of ${name.toLowerCase()}`}
        aria-valuetext={`${thousandths / 10} %`}
        className="h-11 w-full min-w-0 accent-ink max-wide:order-last max-wide:col-span-4"
      />
      <label className="flex items-center gap-1 font-mono">
        <span className="sr-only">Share of {name.toLowerCase()} in per cent</span>
        <input
          inputMode="decimal"
          autoComplete="off"
          value={shown}
          onChange={(event) => {
            setTyped(event.target.value);
            const read = /^\d{1,3}(?:[.,]\d)?$/.exec(event.target.value.trim());
            const value = read ? Math.round(Number(read[0].replace(",", ".")) * 10) : null;
            if (value !== null && value <= 1000) onShare(value);
          }}
          onBlur={() => setTyped(null)}
          onFocus={(event) => event.target.select()}
          className="min-h-11 w-16 rounded-control border border-rule bg-card px-2 text-right"
        />
        %
      </label>
      <button
        type="button"
        onClick={onRemove}
        aria-label={`Leave ${name.toLowerCase()} out`}
        className="grid size-11 place-items-center rounded-control hover:bg-well"
      >
        <Icon name="close" />
      </button>
    </li>
  );
}
