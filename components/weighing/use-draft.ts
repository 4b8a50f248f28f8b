"use client";

import { useEffect, useRef } from "react";
import { isTouched, nextForm, type FormValues } from "./form-values";
import type { TicketForm } from "./use-ticket-form";

/** Under an opaque id, so that one helper of a shared phone never sees another's. */
const keyOf = (helperId: string): string => `bismar-draft:weigh-in:${helperId}`;

function readDraft(helperId: string): FormValues | null {
  try {
    const draft: unknown = JSON.parse(localStorage.getItem(keyOf(helperId)) ?? "null");
    const looksRight =
      typeof draft === "object" &&
      draft !== null &&
      "code" in draft &&
      "readings" in draft &&
      Array.isArray(draft.readings) &&
      draft.readings.length > 0;
    // What a draft of an earlier version lacks, such as its id, it gets now.
    return looksRight ? { ...nextForm(""), ...(draft as FormValues) } : null;
  } catch {
    // No storage, or a text that another version wrote: there is simply no draft.
    return null;
  }
}

function writeDraft(helperId: string, values: FormValues): void {
  try {
    if (isTouched(values)) localStorage.setItem(keyOf(helperId), JSON.stringify(values));
    else localStorage.removeItem(keyOf(helperId));
  } catch {
    // A full or forbidden storage must not stop the weighing; what is typed stays on the screen.
  }
}

/**
 * Keeps what is typed on this device while it is not saved, and gives it back to the same helper: after a
 * session that ended, a reload, a battery.
 *
 * @param helperId null until the server said whose session this is
 */
export function useDraft({ values, get, reset }: TicketForm, helperId: string | null): void {
  const restoredFor = useRef<string | null>(null);
  useEffect(() => {
    if (helperId === null) return;
    if (restoredFor.current !== helperId) {
      restoredFor.current = helperId;
      const draft = readDraft(helperId);
      if (draft && !isTouched(get())) {
        reset(draft);
        return;
      }
    }
    writeDraft(helperId, values);
  }, [get, reset, values, helperId]);
}
