import { rememberedScale, rememberScale } from "../weighing/remembered-scale";
import type { DeskLists } from "../weighing/use-desk-lists";
import { bodyOf, type Draft } from "./draft";
import { judgeDraft, type TippedBag } from "./judged";

/**
 * What a table comes to, judged live.
 *
 * @param usualScaleId the scale of the first bag's weigh-in, for a device that has none of its own
 */
export function boardOf(
  draft: Draft,
  bags: readonly TippedBag[],
  lists: DeskLists,
  usualScaleId: string | null,
) {
  const find = (wanted: string | null) => lists.scales.find(({ id }) => id === wanted);
  const scale =
    find(draft.scaleId) ?? find(rememberedScale()) ?? find(usualScaleId) ?? lists.scales[0];
  return {
    scale,
    count: draft.piles.length + draft.rejects.length,
    judged: judgeDraft(draft, bags, scale, lists.containers),
    body: bodyOf(draft, lists.containers),
    /** The draft on another scale; the device remembers it. */
    onScale: (scaleId: string): Draft => {
      rememberScale(scaleId);
      return { ...draft, scaleId };
    },
  };
}

export type Board = ReturnType<typeof boardOf>;
