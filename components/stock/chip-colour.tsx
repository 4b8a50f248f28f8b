"use client";

import { Notice } from "@/components/ui/notice";
import { CLOSE_DIFFERENCE, colourDifference, labOfHex } from "@/lib/core/colour";
import type { LotSummary } from "@/lib/stock/contract/lots";
import type { PhotoSubjectRef } from "../uploads/photo-subject";
import { usePhotos } from "../uploads/use-photos";

type Props = {
  subject: PhotoSubjectRef;
  colour: Pick<LotSummary, "colourName" | "colourHex" | "colourLook">;
};

/** Says so when a lot's chip photo is of another colour than the lot is said to be. */
export function ChipColour({ subject, colour }: Props) {
  const { data } = usePhotos(subject);
  const chip = data?.photos.find(({ purpose }) => purpose === "chip");
  // A see-through or many-coloured plastic has no one colour to be compared with.
  const expected = colour.colourLook === "solid" ? labOfHex(colour.colourHex) : null;
  if (!chip?.lab || !expected) return null;
  const difference = colourDifference(chip.lab, expected);
  if (difference <= CLOSE_DIFFERENCE) return null;
  return (
    <Notice tone="warn" title="The chip photo has another colour" live="status" className="mb-4">
      It differs from {colour.colourName} by{" "}
      <span className="font-mono font-bold">{(Math.ceil(difference * 10) / 10).toFixed(1)}</span>;
      over {CLOSE_DIFFERENCE} is seen at once. Look whether the pile is in the right lot, whether
      the light was odd, or whether the palette needs another value.
    </Notice>
  );
}
