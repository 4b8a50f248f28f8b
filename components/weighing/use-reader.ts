"use client";

import { useCallback, useState } from "react";
import type { Verdict } from "@/components/scanner/feedback";
import { formatCode, readScan } from "@/lib/core/bag-code";
import { emptyReading, NO_TARE } from "./form-values";
import type { DeskLists } from "./use-desk-lists";
import { focusField } from "./focus-field";
import type { TicketForm } from "./use-ticket-form";

/**
 * Takes what a camera or a hand scanner read, or what was typed and confirmed: a bag's tag goes into the code
 * field, a container's label sets the tare.
 *
 * @returns `take`, which says what the text is, or null when the server has to be asked what its code stands for;
 *   and a note on the last reading for the person who holds the tag
 */
export function useReader(form: Pick<TicketForm, "get" | "set" | "setReading">, lists: DeskLists) {
  const [note, setNote] = useState<string | null>(null);
  const { containers } = lists;

  const take = useCallback(
    (text: string): Verdict | null => {
      const code = readScan(text);
      if (code === null) {
        setNote("That is no tag of this scheme. Scan the bag's tag or a container's label.");
        return "unknown";
      }
      const container = containers.find(({ labelCode }) => labelCode === code);
      const { code: inField, readings } = form.get();
      const at = readings.length - 1;
      const reading = readings[at] ?? emptyReading();
      if (container) {
        form.setReading(at, { container: { ...NO_TARE, choice: container.id } });
        if (readScan(inField) === code) form.set({ code: "" });
        setNote(`${container.name} is set as the container.`);
        return "read";
      }
      const weighing = readScan(inField);
      if (weighing !== null && weighing !== code && reading.gross.trim() !== "") {
        setNote(`Save ${formatCode(weighing)} first, or clear it; then scan the next bag.`);
        return "unknown";
      }
      setNote(null);
      form.set({ code: formatCode(code) });
      focusField(`readings.${at}.gross`);
      return null;
    },
    [containers, form],
  );
  return { take, note, say: setNote, clearNote: () => setNote(null) };
}
