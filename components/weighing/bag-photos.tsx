"use client";

import { useCallback, useEffect, useMemo } from "react";
import type { Lab } from "@/lib/core/colour";
import { PhotoCapture } from "../uploads/photo-capture";
import { isTouched } from "./form-values";
import type { TicketForm } from "./use-ticket-form";

/** Colour of a photo and the ticket that it was taken for. */
export type PhotoColour = { id: string; middle: Lab | null };

type Props = {
  form: Pick<TicketForm, "values" | "set">;
  netGrams: number | null;
  zone: string;
  helperId: string | null;
  onColour: (colour: PhotoColour) => void;
};

/** Photos of the bag on the scale. They go by the ticket's id and never wait for it. */
export function BagPhotos({ form, netGrams, zone, helperId, onColour }: Props) {
  const { values, set } = form;
  const { id, code, photos } = values;
  const touched = isTouched(values);
  useEffect(() => {
    // While there is signal: a photo that is taken later, without, can then be read and kept.
    if (touched) void import("../uploads/photo-intake").catch(() => undefined);
  }, [touched]);
  const subject = useMemo(() => ({ kind: "weigh-in" as const, id }), [id]);
  return (
    <PhotoCapture
      label="Photos of this bag"
      heading={<h2 className="mb-1.5 font-body text-sm font-bold text-soft">Photos</h2>}
      subject={subject}
      helperId={helperId}
      facts={{
        what: code.trim() ? `Bag ${code}` : "This bag",
        grams: netGrams,
        day: null,
        timeZone: zone,
      }}
      started={photos}
      mayRemove
      onStarted={useCallback(() => set({ photos: true }), [set])}
      onMiddle={useCallback((middle: Lab | null) => onColour({ id, middle }), [onColour, id])}
    />
  );
}
