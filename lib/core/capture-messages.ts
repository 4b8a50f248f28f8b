/**
 * Sentences that a capture page says by itself, before or without the server. They stand apart from the
 * catalogue (messages.ts, which has them too), because a phone is not sent all of that to weigh a bag.
 */
import type { ErrorCode, ErrorDetail } from "./errors";
import type { MassReadingProblem } from "./mass";

export type Sentence = (values: ErrorDetail) => string;

/** A value as it stands in a sentence; a missing one leaves a gap rather than "undefined". */
export const text = (value: string | number | null | undefined): string => String(value ?? "");

export const CAPTURE_SENTENCES = {
  "session-ended": () =>
    "Your session has ended. What you typed is still here; sign in and save it again.",
  "tare-above-gross": (v) =>
    `Container and sack weigh ${text(v.tareKg)} kg, more than the ${text(v.grossKg)} kg on the scale. Nothing was saved; check both.`,
  "above-max": (v) =>
    `${text(v.scale)} carries at most ${text(v.maxKg)} kg; ${text(v.readingKg)} kg cannot be read on it. Nothing was saved; weigh in two parts.`,
  "not-a-step": (v) =>
    `The scale shows steps of ${text(v.step)}. ${text(v.readingKg)} kg cannot be right. Nothing was saved; read it again.`,
  "net-zero": () =>
    "Nothing is left after the tare. Nothing was saved; check the reading and the tare.",
  "unknown-container": () =>
    "That container or sack is not in the list any more. Nothing was saved; choose another or type the tare.",
  internal: (v) =>
    `The program failed here, and nothing was saved. Try again; if it happens again, send the request number ${text(v.requestId)} to whoever runs the program.`,
} as const satisfies Partial<Record<ErrorCode, Sentence>>;

export type CaptureCode = keyof typeof CAPTURE_SENTENCES;

/** The sentence for one of these codes with its values. */
export function captureSentence(code: CaptureCode, values: ErrorDetail = {}): string {
  const say: Sentence = CAPTURE_SENTENCES[code];
  return say(values);
}

const MASS_SENTENCES: Record<MassReadingProblem, (typed: string) => string> = {
  empty: () => "Type what the scale shows.",
  "not-a-number": (typed) => `"${typed}" is not a weight. Type a number such as 2.340.`,
  "could-be-thousands": (typed) =>
    `"${typed}" could be a thousand or a fraction. Type it with a point, 1.234, or without a mark, 1234.`,
  negative: () => "A weight cannot be below zero. Zero the scale and read it again.",
  "too-precise": (typed) => `"${typed}" has more decimals than any scale here shows.`,
  "too-large": (typed) => `"${typed}" is more than any scale here carries.`,
};

/** The sentence for a weight that could not be read. */
export function massSentence(problem: MassReadingProblem, typed: string): string {
  return MASS_SENTENCES[problem](typed);
}
