"use client";

import { useRef, useState, type ComponentProps } from "react";
import { isQuiet, setQuiet } from "./feedback";
import { readPhoto } from "./read-photo";
import { CameraError } from "./scan-engine";
import type { ScannerState } from "./scanner";
import { sharedScanner } from "./shared-scanner";

function Choice(props: ComponentProps<"button">) {
  return (
    <button
      type="button"
      className="link inline-flex min-h-11 min-w-11 items-center text-sm font-bold"
      {...props}
    />
  );
}

/** Reads the tag in a picture file. @returns what to say when there was none */
async function takePhoto(file: File): Promise<string | null> {
  const scanner = sharedScanner();
  try {
    const text = await readPhoto(file, (picture, effort) => scanner.decode(picture, effort));
    if (text === null) {
      return "No tag could be read in that picture. Take one closer and in even light, or type the code.";
    }
    scanner.tell(text);
    return null;
  } catch (error) {
    return error instanceof CameraError
      ? "The part that reads tags did not arrive. Try again, or type the code."
      : "That file is no picture that this browser can open. Choose another one, or type the code.";
  }
}

/** Lamp, other camera, sound, and a photo instead of the camera; each only where there is one. */
export function CameraButtons({ state }: { state: ScannerState }) {
  const input = useRef<HTMLInputElement>(null);
  const [quiet, setQuietShown] = useState(isQuiet);
  const [reading, setReading] = useState(false);
  const [said, setSaid] = useState<string | null>(null);
  const on = state.kind === "on" ? state : null;

  async function choose(file: File | undefined): Promise<void> {
    if (!file) return;
    setSaid(null);
    setReading(true);
    setSaid(await takePhoto(file));
    setReading(false);
  }

  return (
    <>
      <div className="flex flex-wrap gap-x-4">
        {on && on.lamp !== null ? (
          <Choice onClick={() => void sharedScanner().setLamp(on.lamp !== true)}>
            {on.lamp ? "Lamp off" : "Lamp on"}
          </Choice>
        ) : null}
        {on && on.cameras > 1 ? (
          <Choice onClick={() => void sharedScanner().nextCamera()}>Other camera</Choice>
        ) : null}
        <Choice
          onClick={() => {
            setQuiet(!quiet);
            setQuietShown(!quiet);
          }}
        >
          {quiet ? "Sound on" : "Sound off"}
        </Choice>
        <Choice
          // In one line with the others on a small phone.
          aria-label={reading ? "Reading the photo" : "Photo of a tag"}
          aria-disabled={reading}
          onClick={() => !reading && input.current?.click()}
        >
          {reading ? "Reading" : "Photo"}
        </Choice>
        <input
          ref={input}
          type="file"
          accept="image/*"
          hidden
          aria-label="Photo of a tag"
          onChange={(event) => {
            void choose(event.target.files?.[0]);
            // The same file may be chosen again.
            event.target.value = "";
          }}
        />
      </div>
      {said ? (
        <p role="status" className="text-sm font-bold text-bad">
          {said}
        </p>
      ) : null}
    </>
  );
}
