"use client";

import { memo, useMemo } from "react";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Skeleton } from "@/components/ui/skeleton";
import { SwatchPaint } from "@/components/ui/swatch-paint";
import type { DeskColour } from "./use-desk-lists";

const PATTERN = { solid: "plain", clear: "clear", mixed: "mixed" } as const;

type Props = {
  colours: readonly DeskColour[];
  value: string;
  onChoose(code: string): void;
  hint: string | undefined;
  error: string | undefined;
};

/** The scheme's palette; the name always stands beside the colour. */
export const ColourTiles = memo(function ColourTiles({
  colours,
  value,
  onChoose,
  hint,
  error,
}: Props) {
  const choices = useMemo(
    () =>
      colours.map(({ code, name, hex, look }) => ({
        value: code,
        label: name,
        swatch: <SwatchPaint hex={hex} pattern={PATTERN[look]} width={84} height={32} />,
      })),
    [colours],
  );
  if (choices.length === 0) return <Skeleton shape="tiles" label="Loading the colours" />;
  return (
    <ChoiceTiles
      legend="Colour"
      name="colourCode"
      choices={choices}
      value={value}
      onChoose={onChoose}
      hint={hint}
      error={error}
    />
  );
});
