/** Sentences about what leaves the shed, and about the scales that weighed it; part of the catalogue (messages.ts). */
import { text, type Sentence } from "./capture-messages";
import type { ErrorCode } from "./errors";

export const REMOVAL_SENTENCES = {
  "unknown-check-weight": () =>
    "That check weight is not in the list any more. Nothing was saved; choose another.",
  "check-weight-too-heavy": (v) =>
    `${text(v.weight)} weighs ${text(v.massKg)} kg; ${text(v.scale)} carries at most ${text(v.maxKg)} kg. Nothing was saved; choose a lighter one.`,
  "check-failed-twice": (v) =>
    `${text(v.scale)} failed its check twice today. Nothing was saved; use another scale, or ask a lead to look at this one and clear it.`,
  "scale-cleared-already": (v) =>
    `${text(v.scale)} has been cleared for ${text(v.day)} already. Nothing was changed.`,
  "unknown-destination": () =>
    "That destination is not in the list any more. Nothing was saved; choose another.",
  "removal-above-book": (v) =>
    `The book has ${text(v.heldKg)} kg in ${text(v.where)}, ${text(v.takenKg)} kg are taken away: ${text(v.surplusKg)} kg more than can be explained. Nothing was saved; weigh it again, and if it stays so, confirm it.`,
  "removal-nothing-there": (v) =>
    `The book has nothing in ${text(v.where)}. Nothing was saved; weigh what is taken away, or enter what the carrier states.`,
  "removal-lot-twice": (v) =>
    `Lot ${text(v.number)} is there twice. Nothing was saved; put both weights together.`,
  "removal-taken-back": () =>
    "This removal was taken back. Nothing was saved; go on with the one that stands in its place.",
  "removal-has-receipt": (v) =>
    `Receipt ${text(v.number)} was entered for it, so it cannot be undone. Nothing was changed; a lead or coordinator can correct it, and the receipt goes along.`,
  "receipt-not-needed": () =>
    "This went to disposal, and only what is passed on is proven by a receipt. Nothing was saved; if it was passed on, correct the removal.",
  "receipt-exists": (v) =>
    `Receipt ${text(v.number)} of ${text(v.day)} was entered for this removal already. Nothing was saved; if that one is wrong, correct it.`,
  "receipt-number-used": (v) =>
    `Receipt ${text(v.number)} of ${text(v.receiver)} was entered already, for the removal of ${text(v.day)}. Nothing was saved; if one paper covers several removals, add a mark of your own, such as ${text(v.number)}/2.`,
  "receipt-too-early": (v) =>
    `A receipt cannot be older than the removal, which was on ${text(v.day)}. Nothing was saved; check both days.`,
} as const satisfies Partial<Record<ErrorCode, Sentence>>;
