"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import { readDraft, writeDraft } from "@/components/forms/kept-draft";
import { newId } from "@/lib/core/ids";
import { lotToTakeEndpoint, type LotToTake } from "@/lib/removals/contract/removals";
import { isChanged, takenUp, type KeptRemoval } from "./kept-removal";
import type { RemovalDraft } from "./removal-draft";
import type { RemovalLists } from "./removal-form";

type Form = Pick<KeptRemoval, "requestId" | "draft">;

/** How the form was opened: each has a draft of its own. */
export type RemovalWay = "bin" | "stock" | "lot";

/**
 * The form of a removal, kept on this device until it is saved.
 *
 * @param start the form as it begins; the same object for as long as the page is open
 */
export function useRemovalDraft(
  helperId: string,
  way: RemovalWay,
  start: RemovalDraft,
  lists: RemovalLists,
) {
  const what = `removal-${way}`;
  const [{ requestId, draft }, setForm] = useState<Form>(() => ({
    requestId: newId(),
    draft: start,
  }));
  const [kept, setKept] = useState(false);
  const looked = useRef(false);

  // The draft is on this device only, so the first drawing of the page does not know it.
  useEffect(() => {
    if (looked.current) return;
    let left = false;
    const put = (lot: LotToTake) =>
      setForm((form) => ({
        ...form,
        draft: {
          ...form.draft,
          loads: form.draft.loads.map((load) =>
            load.lot?.number === lot.number ? { ...load, lot } : load,
          ),
        },
      }));
    const timer = setTimeout(() => {
      looked.current = true;
      const found = takenUp(readDraft(what, helperId), start, lists);
      if (!found) return;
      setForm(found);
      setKept(true);
      for (const { lot } of found.draft.loads) {
        if (!lot) continue;
        // Meanwhile the lot may hold more or less; without an answer the server compares when it is saved.
        fetchEndpoint(lotToTakeEndpoint, { number: lot.number }).then(
          (now) => (left ? undefined : put(now)),
          () => undefined,
        );
      }
    }, 0);
    return () => {
      left = true;
      clearTimeout(timer);
    };
  }, [what, helperId, start, lists]);

  const keep = useCallback(
    (form: Form) => {
      setForm(form);
      const content: KeptRemoval = { ...form, today: lists.today };
      writeDraft(what, helperId, isChanged(form.draft, start) ? content : null);
    },
    [what, helperId, start, lists.today],
  );
  const forget = useCallback(() => writeDraft(what, helperId, null), [what, helperId]);

  return {
    draft,
    requestId,
    /** It was taken up from before. */
    kept,
    change: (next: RemovalDraft) => keep({ requestId, draft: next }),
    /** What is in the form becomes another record: the earlier sending did arrive. */
    renew: () => keep({ requestId: newId(), draft }),
    forget,
    startOver: () => {
      forget();
      setKept(false);
      setForm({ requestId: newId(), draft: start });
    },
  };
}
