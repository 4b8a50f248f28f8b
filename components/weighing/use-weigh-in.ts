"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import { UNREACHABLE_SENTENCE } from "@/components/forms/problem-document";
import { newId } from "@/lib/core/ids";
import type { Question } from "@/lib/weighing/terms";
import { FIRST_ANSWERS, isTouched, labelOf, nextForm, valuesOf, type Answers } from "./form-values";
import { focusField } from "./focus-field";
import { formField, inputOf, netSoFar, readForm, type Problems } from "./read-form";
import { rememberedScale, rememberScale } from "./remembered-scale";
import { saveTicket, type KeptReceipt, type SaveResult } from "./save-ticket";
import type { WeighInEndpointInput } from "./weigh-in-body";
import type { DeskLists } from "./use-desk-lists";
import { useDraft } from "./use-draft";
import { useTicketForm } from "./use-ticket-form";

/** Whoever empties the form gives up its photos too; those that were sent already are tidied by the server. */
async function discardPhotos(subjectId: string): Promise<void> {
  const { photoBox } = await import("../uploads/shared-photo-box");
  await photoBox().dropSubject(subjectId);
}

/** What the page says about the last save. */
export type Said =
  | { kind: "receipt"; receipt: KeptReceipt }
  | { kind: "waiting"; label: string }
  | { kind: "refused"; sentence: string; signIn: boolean };

export type Asking = {
  questions: Extract<SaveResult, { kind: "ask" }>["questions"];
  occurredAt: number;
};

/** The weigh-in form at work: what is typed, what it comes to, saving, and the next bag. */
export function useWeighIn(lists: DeskLists, helperId: string | null) {
  const queries = useQueryClient();
  const form = useTicketForm();
  const { values, get, set, reset, say } = form;
  const [pending, setPending] = useState(false);
  const [said, setSaid] = useState<Said | null>(null);
  const [asking, setAsking] = useState<Asking | null>(null);
  const [last, setLast] = useState<Answers | null>(null);
  const saving = useRef(false);
  useDraft(form, helperId);

  const scale = lists.scales.find(({ id }) => id === values.scaleId);
  // The scale of this device, or the only one there is; never a guess among several.
  useEffect(() => {
    if (values.scaleId !== "" || lists.scales.length === 0) return;
    const remembered = lists.scales.find(({ id }) => id === rememberedScale());
    const only = lists.scales.length === 1 ? lists.scales[0] : undefined;
    const found = remembered ?? only;
    if (found) set({ scaleId: found.id });
  }, [set, lists.scales, values.scaleId]);

  const netGrams = useMemo(
    () => netSoFar(values.readings, lists.containers),
    [values.readings, lists.containers],
  );

  const next = useCallback(() => {
    const { scaleId, readings, polymer, kind, colourCode, oneKind, condition } = get();
    setLast({ polymer, kind, colourCode, oneKind, condition });
    reset(nextForm(scaleId, readings[readings.length - 1]));
  }, [get, reset]);

  const showProblems = useCallback(
    (problems: Problems) => {
      say(problems);
      const first = Object.keys(problems)[0];
      if (first) focusField(first);
    },
    [say],
  );

  /** @returns whether the ticket is kept and the form is ready for the next bag */
  const save = useCallback(
    async (confirmed: Question[] = [], occurredAt = Date.now()): Promise<boolean> => {
      if (saving.current) return false;
      say({});
      setAsking(null);
      const typed = get();
      const read = readForm(
        typed,
        lists.scales.find(({ id }) => id === typed.scaleId),
        lists.containers,
      );
      if (!read.ok) {
        showProblems(read.problems);
        return false;
      }
      if (helperId === null) {
        setSaid({ kind: "refused", sentence: UNREACHABLE_SENTENCE, signIn: false });
        return false;
      }
      saving.current = true;
      setPending(true);
      const label = labelOf(read.code, read.netGrams);
      const input = inputOf(typed, read, {
        requestId: typed.id,
        occurredAt,
        helperId,
        confirmed,
      });
      try {
        const result = await saveTicket(input, label);
        if (result.kind === "ask") {
          setAsking({ questions: result.questions, occurredAt });
        } else if (result.kind === "refused") {
          const { sentence, signIn } = result;
          // An earlier sending did arrive; what is saved now is another reading, with an id of its own.
          if (result.problem?.code === "request-id-reused") set({ id: newId(), photos: false });
          setSaid({ kind: "refused", sentence, signIn });
          const fields = (result.problem?.errors ?? []).map((error) => [
            formField(error.path),
            error.detail,
          ]);
          showProblems(Object.fromEntries(fields) as Record<string, string>);
        } else {
          setSaid(result.kind === "receipt" ? result : { kind: "waiting", label });
          rememberScale(typed.scaleId);
          next();
          void queries.invalidateQueries({ queryKey: ["weigh-ins"] });
          void queries.invalidateQueries({ queryKey: ["scanned"] });
          return true;
        }
        return false;
      } finally {
        saving.current = false;
        setPending(false);
      }
    },
    [get, set, say, helperId, lists.containers, lists.scales, next, queries, showProblems],
  );

  /** Answers what was asked with yes. */
  const confirm = useCallback(
    async (): Promise<boolean> =>
      asking !== null &&
      save(
        asking.questions.map(({ question }) => question),
        asking.occurredAt,
      ),
    [asking, save],
  );

  const sameAsLast = useCallback(() => set(last ?? FIRST_ANSWERS), [last, set]);

  const edit = useCallback(
    (input: WeighInEndpointInput) => {
      reset(valuesOf(input));
      setSaid(null);
      focusField("readings.0.gross");
    },
    [reset],
  );

  const startOver = useCallback(() => {
    const { id, scaleId, readings, photos } = get();
    if (photos) void discardPhotos(id);
    reset(nextForm(scaleId, readings[0]));
    setSaid(null);
  }, [get, reset]);

  return {
    form,
    scale,
    netGrams,
    pending,
    said,
    setSaid,
    asking,
    notNow: () => setAsking(null),
    confirm,
    save,
    sameAsLast: last ? sameAsLast : null,
    edit,
    startOver,
    touched: isTouched(values),
  };
}

export type WeighInForm = ReturnType<typeof useWeighIn>;
