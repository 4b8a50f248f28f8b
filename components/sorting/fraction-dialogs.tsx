"use client";

import type { RejectReason } from "@/lib/sorting/contract/sortings";
import type { DeskLists, DeskScale } from "../weighing/use-desk-lists";
import type { Draft, PileDraft, RejectDraft } from "./draft";
import { PileDialog } from "./pile-dialog";
import { RejectDialog } from "./reject-dialog";

/** Which pile or reject is being looked at. */
export type Opened =
  | { kind: "pile"; value: PileDraft; isNew: boolean }
  | { kind: "reject"; value: RejectDraft; isNew: boolean };

type Props = {
  opened: Opened;
  draft: Draft;
  lists: DeskLists;
  scale: DeskScale | undefined;
  reasons: readonly RejectReason[];
  onDraft: (draft: Draft) => void;
  onClose: () => void;
};

/** Puts one in at its place, or at the end. */
function put<One extends { id: string }>(all: readonly One[], one: One): One[] {
  return all.some(({ id }) => id === one.id)
    ? all.map((other) => (other.id === one.id ? one : other))
    : [...all, one];
}

const without = <One extends { id: string }>(all: readonly One[], one: One): One[] =>
  all.filter(({ id }) => id !== one.id);

/** The dialog of whatever is open. */
export function FractionDialogs({ opened, draft, lists, scale, reasons, onDraft, onClose }: Props) {
  const shared = { isNew: opened.isNew, scale, tares: lists.containers, onClose };
  if (opened.kind === "pile") {
    return (
      <PileDialog
        {...shared}
        pile={opened.value}
        colours={lists.colours}
        onSave={(pile) => onDraft({ ...draft, piles: put(draft.piles, pile) })}
        onRemove={() => onDraft({ ...draft, piles: without(draft.piles, opened.value) })}
      />
    );
  }
  return (
    <RejectDialog
      {...shared}
      reject={opened.value}
      reasons={reasons}
      onSave={(reject) => onDraft({ ...draft, rejects: put(draft.rejects, reject) })}
      onRemove={() => onDraft({ ...draft, rejects: without(draft.rejects, opened.value) })}
    />
  );
}
