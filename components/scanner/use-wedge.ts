"use client";

import { useEffect, useRef } from "react";
import { listenForWedge } from "./wedge";

/** What a hand scanner types while no text field has the focus goes to `onScan`. */
export function useWedge(onScan: (text: string) => unknown): void {
  const latest = useRef(onScan);
  useEffect(() => {
    latest.current = onScan;
  }, [onScan]);
  // Listening once: a render in the middle of a burst must not lose its beginning.
  useEffect(() => listenForWedge((text) => void latest.current(text)), []);
}
