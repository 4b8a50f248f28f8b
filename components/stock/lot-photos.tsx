"use client";

import { useMemo } from "react";
import { QueryProvider } from "@/components/forms/query-provider";
import type { LotSummary } from "@/lib/stock/contract/lots";
import { pileName } from "@/lib/stock/rules/material-words";
import { PhotoButtons } from "../uploads/photo-buttons";
import { PhotoCapture } from "../uploads/photo-capture";
import { ChipColour } from "./chip-colour";

type Props = {
  lotId: string;
  lot: Pick<LotSummary, "colourName" | "colourHex" | "colourLook" | "polymer" | "heldGrams">;
  timeZone: string;
  helperId: string;
  mayRemove: boolean;
};

/** Photos of a lot, one of them of a chip or a handful of flake by itself, whose colour is measured. */
export function LotPhotos({ lotId, lot, timeZone, helperId, mayRemove }: Props) {
  const subject = useMemo(() => ({ kind: "lot" as const, id: lotId }), [lotId]);
  return (
    <QueryProvider>
      <ChipColour subject={subject} colour={lot} />
      <PhotoCapture
        label="Photos of this lot"
        heading={<h2 className="mb-2 text-lg">Photos</h2>}
        subject={subject}
        helperId={helperId}
        facts={{
          what: pileName(lot.colourName, lot.polymer),
          grams: lot.heldGrams,
          day: null,
          timeZone,
        }}
        started
        mayRemove={mayRemove}
        more={(add) => (
          <div className="mt-4 grid gap-2">
            <p className="text-sm text-soft">
              <strong className="text-ink">Chip photo:</strong> a chip or a handful of flake that
              fills the picture, in daylight. Its colour is measured. A new one takes the place of
              the last.
            </p>
            <PhotoButtons
              take="Take chip photo"
              of="chip photo"
              several={false}
              onFiles={(files) => add(files, "chip")}
            />
          </div>
        )}
      />
    </QueryProvider>
  );
}
