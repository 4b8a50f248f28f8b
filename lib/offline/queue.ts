/**
 * What waits on this device to be sent. Invariant: an item leaves only by its receipt or by a person's
 * hand, whatever else happens to the network, the server, the tab or the session.
 *
 * Plain data in, plain data out; the store and the sender are elsewhere.
 */

export type QueueItemState =
  /** Waits for the next try. */
  | "queued"
  /** On its way; after a reload it counts as queued again, because the same request id is safe to send twice. */
  | "sending"
  /** The server said no, or asked: a person has to look. It is not sent again by itself. */
  | "refused";

export type Refusal = {
  code: string;
  sentence: string;
  /** What the server asked or refused in its own words, for the page that shows it. */
  answer?: unknown;
};

export type QueueItem = {
  /** UUIDv7; key of the item and of the record that the server makes. */
  requestId: string;
  method: string;
  /** "/api/weigh-ins" */
  path: string;
  /** Sent byte for byte: the server compares the bytes of a repeated request. */
  rawBody: string;
  /** Opaque id of the person in whose session it was made, the only session that may send it. */
  helper: string;
  /** Epoch milliseconds of this device. */
  madeAt: number;
  /** What a person knows it by, without names: "K7Q2-9F4M, 2.160 kg". */
  label: string;
  state: QueueItemState;
  tries: number;
  refusal: Refusal | null;
};

export type NewItem = Omit<QueueItem, "state" | "tries" | "refusal">;

/** How one sending ended. */
export type SendOutcome =
  | { kind: "receipt"; receipt: unknown }
  | { kind: "refused"; refusal: Refusal }
  /** The server is there but cannot take this one now (busy, failed): the others may still go. */
  | { kind: "later" }
  /** There is no point in trying the others now. */
  | { kind: "stop"; why: StopReason };

export type StopReason =
  /** No answer of the program came. */
  | "unreachable"
  /** Nobody, or another helper, is signed in. */
  | "signed-out"
  /** Another tab is sending and will take it along. */
  | "other-tab";

export function newItem(item: NewItem): QueueItem {
  return { ...item, state: "queued", tries: 0, refusal: null };
}

export function markSending(item: QueueItem): QueueItem {
  return { ...item, state: "sending", tries: item.tries + 1, refusal: null };
}

/** The item after a sending; null when its receipt is in and it may go. */
export function afterSending(item: QueueItem, outcome: SendOutcome): QueueItem | null {
  switch (outcome.kind) {
    case "receipt":
      return null;
    case "refused":
      return { ...item, state: "refused", refusal: outcome.refusal };
    case "later":
    case "stop":
      return { ...item, state: "queued", refusal: null };
  }
}

/** What a pass sends, oldest first: only this helper's, and nothing that a person has to look at. */
export function itemsToSend(items: readonly QueueItem[], helper: string): QueueItem[] {
  return items
    .filter((item) => item.helper === helper && item.state !== "refused")
    .sort((a, b) => a.madeAt - b.madeAt || (a.requestId < b.requestId ? -1 : 1));
}

export type QueueView = {
  /** This helper's, oldest first, refused ones included. */
  mine: QueueItem[];
  waiting: number;
  refused: number;
  /** Items of other helpers of this device: only their number is shown. */
  others: number;
};

export const EMPTY_VIEW: QueueView = { mine: [], waiting: 0, refused: 0, others: 0 };

export function viewFor(items: readonly QueueItem[], helper: string | null): QueueView {
  const mine = items
    .filter((item) => item.helper === helper)
    .sort((a, b) => a.madeAt - b.madeAt || (a.requestId < b.requestId ? -1 : 1));
  const refused = mine.filter((item) => item.state === "refused").length;
  return { mine, waiting: mine.length - refused, refused, others: items.length - mine.length };
}
