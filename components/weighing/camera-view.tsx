"use client";

import { useEffect, useRef, useSyncExternalStore } from "react";
import { Notice } from "@/components/ui/notice";
import type { CameraTrouble } from "./scanner/scan-engine";
import type { ScannerState } from "./scanner/scanner";
import { sharedScanner } from "./scanner/shared-scanner";

const OFF: ScannerState = { kind: "off" };

const TROUBLE: Record<CameraTrouble, string> = {
  refused:
    "This page may not use the camera. Allow it in the browser's settings for this address, or type the code.",
  absent: "This device has no camera. Type the code, or use a hand scanner in the code field.",
  busy: "Another program holds the camera. Close it and start again, or type the code.",
  insecure:
    "Browsers give the camera to https addresses only, and this one is not. Type the code, or use a hand scanner.",
  failed: "The camera did not start. Try again, or type the code.",
};

type Props = {
  onRead(text: string): void;
  onTrouble(): void;
  /** Changes when the form was emptied by hand: the same tag may then be read again. */
  fresh?: number;
};

/** The camera's picture while scanning. Leaving it lets the camera go. */
export function CameraView({ onRead, onTrouble, fresh = 0 }: Props) {
  const place = useRef<HTMLDivElement>(null);
  const state = useSyncExternalStore(
    (listener) => sharedScanner().subscribe(listener),
    () => sharedScanner().current(),
    () => OFF,
  );

  useEffect(() => {
    const scanner = sharedScanner();
    if (place.current) scanner.show(place.current);
    return () => scanner.hide();
  }, []);

  useEffect(() => {
    sharedScanner().listen((text) => {
      // A short buzz, where the phone can: eyes are on the bag.
      if ("vibrate" in navigator) navigator.vibrate(60);
      onRead(text);
    });
  }, [onRead]);

  useEffect(() => {
    sharedScanner().forget();
  }, [fresh]);

  const trouble = state.kind === "trouble" ? state.trouble : null;
  return (
    <div className="mb-3">
      <div
        ref={place}
        data-camera={state.kind}
        aria-hidden
        className={`h-44 overflow-hidden rounded-ticket bg-ink *:h-full [&_video]:h-full! [&_video]:w-full! [&_video]:object-cover ${trouble ? "hidden" : ""}`}
      />
      {trouble ? (
        <Notice
          tone="warn"
          title="No camera"
          live="status"
          action={
            <button
              type="button"
              onClick={onTrouble}
              className="link inline-flex min-h-11 items-center font-bold"
            >
              Close
            </button>
          }
        >
          {TROUBLE[trouble]}
        </Notice>
      ) : (
        <p role="status" className="mt-1 text-sm text-soft">
          {state.kind === "on"
            ? "Hold the tag in the picture. A container's label sets the tare."
            : "Starting the camera"}
        </p>
      )}
    </div>
  );
}
