/** Sentences about lots: counting, moving, washing, drying, shredding. They are part of the catalogue (messages.ts). */
import { text, type Sentence } from "./capture-messages";
import type { ErrorCode } from "./errors";

export const STOCK_SENTENCES = {
  "unknown-lot": (v) =>
    `There is no lot ${text(v.number)}. Nothing was saved; look at the number on its label.`,
  "lot-counted-meanwhile": (v) =>
    `${text(v.who)} counted lot ${text(v.number)} meanwhile: ${text(v.foundKg)} kg at ${text(v.when)}. Nothing was saved and what you typed is still here; look again, or send it again to let yours stand.`,
  "lot-moved-meanwhile": (v) =>
    `Lot ${text(v.number)} moved meanwhile: ${text(v.what)} by ${text(v.who)} at ${text(v.when)}, and the book holds ${text(v.bookKg)} kg now. Nothing was saved and what you typed is still here; weigh again, or send it again to let yours stand.`,
  "lot-holds-less": (v) =>
    `The book holds ${text(v.bookKg)} kg in lot ${text(v.number)}, and ${text(v.wantedKg)} kg were taken. Nothing was saved yet; weigh what is left in the bin, or say that it is empty, and it goes through.`,
  "lot-empty": (v) =>
    `By the book lot ${text(v.number)} holds nothing. Nothing was saved; weigh what you take out of it.`,
  "lot-closed-already": (v) =>
    `Lot ${text(v.number)} was closed on ${text(v.when)}. Nothing was changed.`,
  "lots-differ": (v) =>
    `Lot ${text(v.from)} and lot ${text(v.to)} are not of one material. Nothing was saved; only lots of one polymer, kind, colour, form and wash state can be joined.`,
  "same-lot": (v) => `That is lot ${text(v.number)} itself. Nothing was saved; choose another lot.`,
  "lot-twice": (v) =>
    `Lot ${text(v.number)} stands there twice. Nothing was saved; enter all of it in one line.`,
  "lot-identified-already": (v) =>
    `Lot ${text(v.number)} is no “Not sure” stock. Nothing was saved; what is in the wrong lot is put right by a correction.`,
  "container-taken": (v) =>
    `${text(v.name)} holds lot ${text(v.number)}, which is open. Nothing was changed; close that lot first, or choose another container.`,
  "count-zero": () =>
    "Nothing is left after the tare. Nothing was saved; if the bin is empty, use “Bin is empty”.",
  "weighed-back-more": (v) =>
    `The bin weighed ${text(v.beforeKg)} kg before and ${text(v.afterKg)} kg after. Nothing was saved; read both again.`,
  "stated-in-correction": () =>
    "A weight that was not read off a scale can be given in a correction only. Nothing was saved; weigh it.",
  "step-polymers-differ": () =>
    "These lots are not of one polymer. Nothing was saved; wash, dry and shred each polymer by itself.",
  "step-forms-differ": () =>
    "These lots are not of one form. Nothing was saved; wash and dry whole items and flake apart.",
  "step-output-kind": () =>
    "More than one kind went in. Nothing was saved; say which kind came out.",
  "step-output-colour": () =>
    "More than one colour went in. Nothing was saved; say which colour came out, or choose mixed.",
  "step-beyond-tolerance": (v) =>
    `${text(v.inputKg)} kg went in, ${text(v.outputKg)} kg came out; ${text(v.differenceKg)} kg is more than the scale can explain (${text(v.toleranceKg)} kg). Nothing was saved; weigh again, or say where it went.`,
  "step-output-above-input": (v) =>
    `${text(v.inputKg)} kg went in and ${text(v.outputKg)} kg came out, ${text(v.differenceKg)} kg more. Nothing was saved; weigh both again, and if it stays so, confirm it.`,
} as const satisfies Partial<Record<ErrorCode, Sentence>>;
