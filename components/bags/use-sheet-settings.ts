"use client";

import { useState, useSyncExternalStore } from "react";
import {
  readSheetSettings,
  type SheetSettings,
  type TypedSettings,
} from "@/lib/bags/rules/tag-sheet";

/**
 * What this browser keeps about its printer: the sheet used last and, for each sheet, how far everything
 * must be moved. It is the printer's business, so it stays on the device and is no setting of the scheme.
 */
type Kept = {
  sheet?: string;
  lines?: string;
  x?: Record<string, string>;
  y?: Record<string, string>;
};

const KEY = "bismar.label-sheets";

function subscribe(onChange: () => void): () => void {
  window.addEventListener("storage", onChange);
  return () => window.removeEventListener("storage", onChange);
}

function readKept(): string {
  try {
    return localStorage.getItem(KEY) ?? "";
  } catch {
    // Storage is switched off in this browser: what is set lasts as long as the page.
    return "";
  }
}

function parseKept(text: string): Kept {
  try {
    const kept: unknown = JSON.parse(text || "{}");
    return typeof kept === "object" && kept !== null ? kept : {};
  } catch {
    return {};
  }
}

export type SheetForm = {
  settings: SheetSettings;
  /** As typed; what is no number yet counts as none. */
  typed: { start: string; x: string; y: string };
  change(change: TypedSettings): void;
};

/** Sheet, first free label, offsets and cutting lines: from the address, else what this browser keeps. */
export function useSheetSettings(initial: TypedSettings): SheetForm {
  const [typed, setTyped] = useState(initial);
  const kept = parseKept(useSyncExternalStore(subscribe, readKept, () => ""));
  const { sheet } = readSheetSettings({ sheet: typed.sheet ?? kept.sheet });
  const x = typed.x ?? kept.x?.[sheet] ?? "0";
  const y = typed.y ?? kept.y?.[sheet] ?? "0";
  const start = typed.start ?? "1";
  const lines = typed.lines ?? kept.lines;
  return {
    settings: readSheetSettings({ sheet, start, x, y, lines }),
    typed: { start, x, y },
    change(change) {
      // Another sheet has offsets of its own and is a new one: begin at its first label.
      const base = change.sheet === undefined ? typed : { lines: typed.lines };
      setTyped({ ...base, ...change });
      const next: Kept = {
        sheet: change.sheet ?? sheet,
        lines: change.lines ?? lines,
        x: change.x === undefined ? kept.x : { ...kept.x, [sheet]: change.x },
        y: change.y === undefined ? kept.y : { ...kept.y, [sheet]: change.y },
      };
      try {
        localStorage.setItem(KEY, JSON.stringify(next));
      } catch {
        // As above: it lasts as long as the page.
      }
    },
  };
}
