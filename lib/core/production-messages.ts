/** Sentences of the workshop: catalogue, plans, reservations, runs. */
import { text, type Sentence } from "./capture-messages";
import type { ErrorCode } from "./errors";

export const PRODUCTION_SENTENCES = {
  "piece-of-another-method": (v) =>
    `${text(v.machine)} does not do that: the piece is made by ${text(v.method)}. Nothing was saved; choose another machine.`,
  "tool-of-another-piece": (v) =>
    `${text(v.tool)} makes another piece. Nothing was saved; choose the tool of this one.`,
  "never-heated": (v) =>
    `${text(v.polymer)} is never heated here. Nothing was saved; choose another polymer.`,
  "not-in-catalogue": (v) =>
    `${text(v.name)} has left the catalogue. Nothing was saved; choose another.`,
  "plan-lacks": (v) =>
    `A plan needs a ${text(v.what)} for this piece. Nothing was saved; choose one, or add it to the catalogue.`,
  "plan-colour": () => "That is no colour of the palette. Nothing was saved; choose another.",
  "shot-too-large": (v) =>
    `One shot takes ${text(v.shotMilligrams)} g, and the barrel gives ${text(v.fillMilligrams)} g. Nothing was saved; choose a larger machine or a tool with fewer cavities.`,
  "shot-too-small": (v) =>
    `One shot takes ${text(v.shotMilligrams)} g, less than the ${text(v.leastShotMilligrams)} g that the machine needs at least. Nothing was saved; choose a smaller machine or a tool with more cavities.`,
  "sheet-too-large": () =>
    "The sheet does not fit the machine's plate either way round. Nothing was saved; choose a larger press or a smaller sheet.",
  "run-not-planned": (v) =>
    `Run ${text(v.number)} is no plan any more. Nothing was changed; look at the run as it stands.`,
  "run-reserved": (v) =>
    `Run ${text(v.number)} has stock reserved for this plan. Nothing was changed; give that back first.`,
  "nothing-free": () =>
    "No lot has any of these colours free. Nothing was reserved; change the blend or look again later.",
  "nothing-lacks": () => "All of the blend is reserved already. Nothing more was reserved.",
  "nothing-reserved": (v) =>
    `Run ${text(v.number)} has nothing reserved any more. Nothing was changed; reserve again.`,
  "lot-not-for-run": (v) =>
    `Lot ${text(v.number)} cannot be used for this run: it is empty, of another polymer, colour or kind, needs a step first, or is named twice. Nothing was reserved; choose another.`,
  "lot-not-free": (v) =>
    `Lot ${text(v.number)} has ${text(v.freeKg)} kg free now, not ${text(v.wantedKg)} kg. Nothing was reserved; take what is free or choose another lot.`,
  "lot-reserved": (v) =>
    `${text(v.promisedKg)} kg of lot ${text(v.number)} are reserved for run ${text(v.runs)}, and ${text(v.leftKg)} kg would be left. Nothing was saved yet; take less, or take them all the same and its lead is told.`,
} as const satisfies Partial<Record<ErrorCode, Sentence>>;
