/**
 * The catalogue of sentences (English). An error says what is wrong, what was kept and what to do.
 * It does not compile when a code has no sentence.
 */
import { CAPTURE_SENTENCES, text, type Sentence } from "./capture-messages";
import type { ErrorCode, ErrorDetail } from "./errors";
import { PHOTO_SENTENCES } from "./photo-messages";
import { STOCK_SENTENCES } from "./stock-messages";
import { PRODUCTION_SENTENCES } from "./production-messages";
import { REMOVAL_SENTENCES } from "./removal-messages";

const SENTENCES: Record<ErrorCode, Sentence> = {
  ...CAPTURE_SENTENCES,
  ...PHOTO_SENTENCES,
  ...STOCK_SENTENCES,
  ...REMOVAL_SENTENCES,
  ...PRODUCTION_SENTENCES,
  "signed-out": () => "You are not signed in. What you typed is kept; sign in and send it again.",
  "wrong-sign-in": () => "That address and password do not fit together. Check both and try again.",
  "sign-in-slowed": (v) =>
    `Too many tries. Wait ${text(v.seconds)} seconds and try again; nothing else is needed.`,
  forbidden: () => "Your role does not include this. Nothing was changed; ask a coordinator.",
  "cross-origin": () =>
    "This request came from another site and was refused. Nothing was changed; use the program's own page.",
  "not-found": () => "There is nothing here under this address, or it is not yours to see.",
  "method-not-allowed": () => "This address does not take that kind of request.",
  "unknown-code": (v) =>
    `No tag of this scheme has the code ${text(v.code)}. Nothing was saved; check it against the label, or give the bag a spare tag.`,
  "too-large": () => "That is more than this page takes in one go. Nothing was saved.",
  "not-json": () => "The request was not in the form that this address reads. Nothing was saved.",
  "malformed-json": () =>
    "The request could not be read to its end. Nothing was saved; send it again.",
  invalid: () => "Some of this cannot be right. Nothing was saved; look at the marked fields.",
  "request-id-reused": () =>
    "This was sent before with other content. The first one was kept; reload the page before you save again.",
  "bag-already-weighed": (v) =>
    `This bag was weighed already: ${text(v.kg)} kg on ${text(v.when)} by ${text(v.who)}.`,
  "other-helper": () =>
    "This was weighed in another helper's session. Nothing was saved; it waits on this device until they sign in here.",
  "not-a-bag": (v) =>
    `The code ${text(v.code)} is on the label of a ${text(v.label)}, not on a bag's tag. Nothing was saved; scan the bag.`,
  "bag-already-sorted": (v) =>
    `Bag ${text(v.code)} has been sorted already. Nothing was saved; take it off this table.`,
  "bag-not-weighed": (v) =>
    `Bag ${text(v.code)} has not been weighed in yet. Nothing was saved; weigh it first.`,
  "label-in-use": (v) =>
    `The code ${text(v.code)} is in use already. Nothing was saved; take another tag.`,
  "bag-wrong-state": (v) =>
    `Bag ${text(v.code)} is "${text(v.state)}", which does not lead there. Nothing was saved; scan it again to see where it stands.`,
  "point-built-in": (v) =>
    `${text(v.name)} is part of the program: bags without a tag are entered there. Nothing was changed.`,
  "scale-step": () =>
    "A scale's step is 1, 2 or 5, or ten, a hundred … times that. Nothing was saved; read d on the plate again.",
  "scale-interval": (v) =>
    `A class ${text(v.class)} scale has an e of ${text(v.least)} or more, no finer than d and at most ten times d. Nothing was saved; read e and d on the plate again.`,
  "scale-max": (v) =>
    `Max must be a whole number of steps of ${text(v.step)}. Nothing was saved; read Max on the plate again.`,
  "scale-intervals": (v) =>
    `Max divided by e is ${text(v.count)}; class ${text(v.class)} has ${text(v.least)} to ${text(v.most)}. Nothing was saved; read Max, e and the class on the plate again.`,
  "colour-order": () =>
    "The palette was changed by somebody else meanwhile. Nothing was changed; look at it again and order it anew.",
  "future-time": (v) =>
    `${text(v.when)} has not come yet. Nothing was saved; check the date and the clock of this device.`,
  "too-long-ago": (v) =>
    `${text(v.when)} is before this scheme began. Nothing was saved; check the date.`,
  "one-kind-needs-material": () =>
    "A bag of one kind needs its resin code, kind and colour. Nothing was saved; choose them, or leave it to sort.",
  "unknown-point": () =>
    "That drop-off point is not in the list any more. Nothing was saved; choose another.",
  "unknown-scale": () =>
    "That scale is not in the list any more. Nothing was saved; choose another.",
  "unknown-colour": () =>
    "That colour is not in the palette any more. Nothing was saved; choose another.",
  "unknown-reason": () =>
    "That reason is not in the list any more. Nothing was saved; choose another.",
  "undo-too-late": () =>
    "Undo works for ten minutes after saving. Nothing was changed; ask a lead or coordinator to correct it.",
  "undo-not-yours": () => "Only the person who saved this can undo it. Nothing was changed.",
  "undo-used-since": () =>
    "Something was taken from it since, so it cannot be undone. Nothing was changed; it can be corrected instead.",
  "undone-already": () => "This was undone already. Nothing was changed.",
  "undo-of-correction": () =>
    "This stands in the place of a record that was corrected, so it cannot be undone. Correct it once more instead; nothing was changed.",
  "not-for-review": () => "Somebody has decided about this reading already. Nothing was changed.",
  "corrected-already": () =>
    "This was corrected already. Nothing was changed; correct the record that stands in its place.",
  "lot-closed": ({ lot }) =>
    `Lot ${lot} takes no more: it was closed meanwhile. Nothing was saved and nothing that you typed is lost; choose another lot or a new one.`,
  "lot-other-material": ({ lot }) =>
    `Lot ${lot} holds something else. Nothing was saved; choose another lot or a new one.`,
  "bag-in-other-session": ({ code, who }) =>
    `Bag ${code} is on the table of ${who}. Nothing was saved and nothing that you typed is lost; sort it there, or take it off that table first.`,
  "draft-overtaken": ({ who }) =>
    `${who} has changed this session meanwhile. Nothing was saved over it and what you typed is kept here; look at the other's first.`,
  "draft-over": () =>
    "This session was saved or given up meanwhile. What you typed is still here; start a new one if it is needed.",
  "no-bags": () => "There is no bag on the table. Nothing was saved; scan one first.",
  "piles-empty": () => "There is no pile and no reject yet. Nothing was saved; weigh at least one.",
  "sum-beyond-tolerance": (v) =>
    `The piles add up to ${text(v.sumKg)} kg of ${text(v.netKg)} kg; ${text(v.differenceKg)} kg is more than the scale can explain (${text(v.toleranceKg)} kg). Nothing was saved; weigh the piles again, or say where it went.`,
  "sum-far-above-net": (v) =>
    `The piles add up to ${text(v.sumKg)} kg, but the bag held ${text(v.netKg)} kg. Nothing was saved; weigh the piles again, and if it stays so, confirm it.`,
  "name-in-use": (v) =>
    `There is already one called ${text(v.name)}. Nothing was saved; choose another name.`,
  "email-in-use": () => "Somebody with this address is already here. Nothing was sent.",
  "joined-already": () =>
    "This person has set a password already. Nothing was sent; “Forgotten password” makes a new link.",
  "link-expired": () =>
    "This link was used already or is older than a day. Nothing was changed; ask for a new one.",
  "password-too-short": (v) =>
    `A password needs at least ${text(v.least)} characters. Nothing was changed; a few words in a row are easy to keep.`,
  "password-too-long": (v) =>
    `A password has at most ${text(v.most)} characters here. Nothing was changed; choose a shorter one.`,
  "password-too-common": () =>
    "This password is one of the first that anybody tries. Nothing was changed; choose another.",
  "password-wrong": () => "The present password is not right. Nothing was changed.",
  "last-coordinator": () =>
    "This is the only coordinator. Nothing was changed; make somebody else coordinator first.",
  "own-role": () =>
    "You cannot change your own role. Nothing was changed; ask another coordinator.",
  "ledger-short": (v) =>
    `The book holds ${text(v.heldKg)} kg there, ${text(v.wantedKg)} kg was to be taken. Nothing was saved; count what is there.`,
  "ledger-unbalanced": () =>
    "The ledger refused an entry that does not add up. Nothing was saved; send the request number to whoever runs the program.",
  "ledger-correction-of-reversal": () =>
    "This entry takes another one back and cannot be taken back itself. Nothing was changed; correct the newer entry.",
  "opening-refused": () =>
    "An opening count is only possible on the scheme's first day. Nothing was saved.",
  "zone-fixed": () =>
    "The time zone is fixed since the first entry, because days and months rest on it. Nothing was changed.",
  "period-invalid": () =>
    "The last day must not be before the first. Nothing was shown; choose other days.",
  "verify-under-way": () =>
    "The ledger is being verified already. Wait for that to end; its result shows here.",
  "scheme-exists": (v) =>
    `This database holds a scheme already: ${text(v.name)}. Nothing was changed; one database is one scheme.`,
  busy: () => "The database is busy. Nothing was saved; try again in a moment.",
  "database-unavailable": () =>
    "The database does not answer. Nothing was saved; whoever runs the program must look at it.",
};

/** The sentence for an error code with its values. */
export function sentence(code: ErrorCode, values: ErrorDetail = {}): string {
  return SENTENCES[code](values);
}

/** What a contract's check says about one field: our own codes, then those of the schema library. */
const FIELD_SENTENCES: Readonly<Record<string, string>> = {
  empty: "This is needed.",
  "too-long": "This is too long.",
  "too-short": "Say it in a few words, so that whoever reads the history understands.",
  "not-a-number": "This is not a number. Look at the label.",
  "could-be-thousands":
    "This could be a thousand or a fraction. Type it with a point, 1.234, or without a mark, 1234.",
  negative: "This cannot be below zero.",
  "too-precise": "This has more decimals than count here.",
  "too-large": "This is larger than anything here.",
  "out-of-range": "This is too small or too large for that.",
  "mass-or-volume": "Give the volume or the mass of one piece, one of the two.",
  "one-at-least": "Choose at least one.",
  "shares-not-whole": "The shares must add up to 100 %.",
  "colour-twice": "A colour stands there twice. Give it one share.",
  "above-ceiling":
    "This is hotter than the polymer may ever get. Type what stands beside it, or less.",
  "polymer-twice": "One polymer is named twice. Keep one temperature for each.",
  "sheet-size": "A sheet has a length, a width and a thickness.",
  "too-long-minutes": "That is more than two weeks. Type the minutes.",
  "not-an-id": "This is not a number that the program gave out. Reload the page and choose again.",
  "not-a-day": "This is not a day. Choose one such as 6 May 2026.",
  "not-an-email": "This is not a mail address. It looks like name@example.org.",
  "whole-number": "This is a number without decimals, such as 40.",
  "too-few": "At least 1 is needed.",
  "too-many": "That is more than goes in one order. Make two.",
  "not-a-waste-code":
    "A code of the List of Waste has six figures, such as 20 01 39, and a * where it is hazardous.",
  "mixed-sources": "The reject bin and lots leave in removals of their own.",
  "not-a-hex": "A colour value is # and six signs, such as #1f46d6.",
  "not-a-colour": "That is no colour of the palette. Reload the page and choose again.",
  "wrong-check": "The last character does not fit the code. Check it against the label.",
  "wrong-length": "A code has eight characters.",
  "wrong-symbol": "A code has only letters and figures, and no U.",
  invalid_type: "This is missing, or of another kind than expected.",
  too_small: "This is too small or too short.",
  too_big: "This is too large or too long.",
  invalid_format: "This is not written as expected.",
  not_multiple_of: "This is not a step that is possible here.",
  invalid_value: "This is not one of the choices.",
  invalid_union: "This is not one of the choices.",
  unrecognized_keys: "This is not known here.",
};

/** The sentence for one refused field; an unknown code gets the general one. */
export function fieldSentence(code: string): string {
  return FIELD_SENTENCES[code] ?? "This cannot be right.";
}
