"use client";

import { useEffect, useRef } from "react";
import { readDraft, writeDraft } from "@/components/forms/kept-draft";
import { isTouched, nextForm, type FormValues } from "./form-values";
import type { TicketForm } from "./use-ticket-form";

const KEPT_AS = "weigh-in";

function readForm(helperId: string): FormValues | null {
  const draft = readDraft(KEPT_AS, helperId);
  const looksRight =
    draft !== null &&
    "code" in draft &&
    "readings" in draft &&
    Array.isArray(draft.readings) &&
    draft.readings.length > 0;
  // What a draft of an earlier version lacks, such as its id, it gets now.
  return looksRight ? { ...nextForm(""), ...(draft as FormValues) } : null;
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
      const draft = readForm(helperId);
      if (draft && !isTouched(get())) {
        reset(draft);
        return;
      }
    }
    writeDraft(KEPT_AS, helperId, isTouched(values) ? values : null);
  }, [get, reset, values, helperId]);
}
