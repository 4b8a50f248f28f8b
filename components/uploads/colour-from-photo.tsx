"use client";

import { useState } from "react";
import type { ComparedColour, Lab } from "@/lib/core/colour";
import { photoSentence } from "@/lib/core/photo-messages";
import { ColourHelp } from "./colour-help";
import { PhotoButtons } from "./photo-buttons";

type Props = {
  palette: readonly (ComparedColour & { code: string; name: string })[];
  value: string;
  onChoose: (code: string) => void;
};

type Said = { kind: "colour"; lab: Lab } | { kind: "words"; words: string };

/** Colour help from a picture that is only measured on this device, and neither kept nor sent. */
export function ColourFromPhoto({ palette, value, onChoose }: Props) {
  const [said, setSaid] = useState<Said | null>(null);
  const isClear = palette.find(({ code }) => code === value)?.look === "clear";
  if (isClear) return null;

  async function measure([file]: File[]) {
    if (!file) return;
    try {
      const { colourOfPicture } = await import("./prepare-photo");
      const read = await colourOfPicture(file);
      if (!read.ok) setSaid({ kind: "words", words: photoSentence(read.code) });
      else if (read.lab) setSaid({ kind: "colour", lab: read.lab });
      else {
        setSaid({
          kind: "words",
          words: "The middle of the picture is all glare or all dark. Choose the colour by eye.",
        });
      }
    } catch {
      setSaid({
        kind: "words",
        words: "The server did not answer, so the picture could not be measured. Choose by eye.",
      });
    }
  }

  return (
    <div className="grid gap-2">
      <PhotoButtons
        take="Colour by photo"
        of="a photo to measure its colour"
        several={false}
        onFiles={(files) => void measure(files)}
      />
      <div role="status">
        {said?.kind === "colour" ? (
          <ColourHelp lab={said.lab} palette={palette} value={value} onChoose={onChoose} />
        ) : said ? (
          <p className="text-sm text-soft">{said.words}</p>
        ) : null}
      </div>
    </div>
  );
}
