"use client";

import { useEffect, useRef, useSyncExternalStore } from "react";
import { Icon } from "@/components/ui/icon";
import { Notice } from "@/components/ui/notice";
import { readScan } from "@/lib/core/bag-code";
import { CameraButtons } from "./camera-buttons";
import type { Verdict } from "./feedback";
import type { CameraTrouble } from "./scan-engine";
import type { ScannerState } from "./scanner";
import { sharedScanner } from "./shared-scanner";

const OFF: ScannerState = { kind: "off" };

const TROUBLE: Record<CameraTrouble, string> = {
  refused:
    "This page may not use the camera. Allow it in the browser's settings for this address, or type the code.",
  absent: "This device has no camera. Type the code, or use a hand scanner.",
  busy: "Another program holds the camera. Close it and start again, or type the code.",
  insecure:
    "Browsers give the camera to https addresses only, and this one is not. Type the code, or use a hand scanner.",
  unread:
    "The part that reads tags did not arrive, or does not work in this browser. Try again, or type the code.",
  failed: "The camera did not start. Try again, or type the code.",
};

const MARK: Record<Verdict, { words: string; look: string; frame: string }> = {
  read: { words: "Read", look: "bg-ok-soft text-ok", frame: "outline-ok" },
  unknown: { words: "Not known", look: "bg-bad-soft text-bad", frame: "outline-bad" },
};

/** What a code turned out to be, once that is known. */
export type Settled = { code: string; verdict: Verdict };

type Props = {
  /** @returns what the text is, or null when it has to be looked up: then `settled` says it later */
  onRead(text: string): Verdict | null;
  settled?: Settled | null;
  onTrouble(): void;
  /** Changes when the form was emptied by hand: the same tag may then be read again. */
  fresh?: number;
  /** Shown beside the picture where bags are counted. */
  bagsToday?: number | null;
};

/** The camera's picture while scanning. Leaving it lets the camera go. */
export function CameraView({ onRead, settled = null, onTrouble, fresh = 0, bagsToday }: Props) {
  const place = useRef<HTMLDivElement>(null);
  const known = useRef<Settled | null>(null);
  const awaited = useRef<string | null>(null);
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
    const scanner = sharedScanner();
    scanner.listen((text) => {
      const verdict = onRead(text);
      awaited.current = null;
      if (verdict) scanner.settle(verdict);
      // The code may have stood in the field before, looked up already.
      else if (known.current && readScan(text) === known.current.code) {
        scanner.settle(known.current.verdict);
      } else awaited.current = readScan(text);
    });
  }, [onRead]);

  useEffect(() => {
    known.current = settled;
    if (!settled || awaited.current !== settled.code) return;
    awaited.current = null;
    sharedScanner().settle(settled.verdict);
  }, [settled]);

  useEffect(() => {
    sharedScanner().forget();
  }, [fresh]);

  const trouble = state.kind === "trouble" ? state.trouble : null;
  const mark = state.kind === "on" && state.mark ? MARK[state.mark] : null;
  return (
    <div className="mb-3">
      <div className={`relative ${trouble ? "hidden" : ""}`}>
        <div
          ref={place}
          data-camera={state.kind}
          data-engine={state.kind === "on" ? (state.engine ?? "none") : "none"}
          aria-hidden
          className={`h-44 overflow-hidden rounded-ticket bg-ink *:h-full [&_video]:h-full! [&_video]:w-full! [&_video]:object-cover ${mark ? `outline-4 -outline-offset-4 ${mark.frame}` : ""}`}
        />
        {mark ? (
          <p
            data-mark={mark.words}
            className={`absolute bottom-2.5 left-2.5 flex items-center gap-1.5 rounded-control px-3 py-1.5 font-bold ${mark.look}`}
          >
            <Icon name={mark.words === "Read" ? "check" : "close"} size={20} />
            {mark.words}
          </p>
        ) : null}
      </div>
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
        <div className="mt-1 flex items-baseline justify-between gap-x-4 text-sm">
          <p role="status" className="text-soft">
            {state.kind !== "on"
              ? "Starting the camera"
              : state.engine === null
                ? "Fetching what reads the tags"
                : "Hold the tag in the picture."}
          </p>
          {bagsToday === undefined || bagsToday === null ? null : (
            <p className="shrink-0 font-bold">
              {bagsToday === 1 ? "1 bag today" : `${bagsToday} bags today`}
            </p>
          )}
        </div>
      )}
      <CameraButtons state={state} />
    </div>
  );
}
