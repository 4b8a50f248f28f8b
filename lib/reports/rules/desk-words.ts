/** Invariant: what waits is a sentence with one place to go to, the most pressing first, and nothing that is nought. */
import { formatKg } from "@/lib/core/mass";
import { formatDay, type Day } from "@/lib/core/time";
import type { LimitTold } from "@/lib/stock/rules/limits";

export type Waiting = {
  bagsToWeigh: number;
  bagsToSort: { bags: number; grams: number };
  sessionsAside: number;
  scalesToCheck: { id: string; name: string }[];
  /** For leads and coordinators; null for others. */
  leading: {
    readingsToReview: number;
    countsToReview: number;
    receiptsMissing: number;
    /** Permits of carriers and receivers that run out within thirty days, or have. */
    permits: { name: string; until: Day; over: boolean }[];
    limits: LimitTold[];
  } | null;
};

export type DoneToday = {
  weighed: { bags: number; grams: number };
  sorted: { sessions: number; grams: number };
  steps: number;
  counts: number;
  removals: { count: number; grams: number };
};

export type WaitingLine = {
  key: string;
  tone: "plain" | "warn";
  sentence: string;
  href: string;
  action: string;
};

const counted = (count: number, one: string, many: string): string =>
  `${count} ${count === 1 ? one : many}`;

/** What waits, in the order in which it should be seen to. */
export function waitingLines({ leading, ...waiting }: Waiting): WaitingLine[] {
  const lines: WaitingLine[] = [];
  const add = (
    key: string,
    sentence: string,
    href: string,
    action: string,
    tone: WaitingLine["tone"] = "plain",
  ) => lines.push({ key, tone, sentence, href, action });

  for (const limit of leading?.limits ?? []) {
    add(`limit-${limit.kind}`, limit.sentence, "/stock", "See the stock", "warn");
  }
  for (const { name, until, over } of leading?.permits ?? []) {
    const sentence = over
      ? `The permit of ${name} ran out on ${formatDay(until)}.`
      : `The permit of ${name} is good until ${formatDay(until)}.`;
    add(`permit-${name}`, sentence, "/removals/destinations", "See destinations", "warn");
  }
  for (const { id, name } of waiting.scalesToCheck) {
    add(
      `scale-${id}`,
      `${name}: no check weight has confirmed it today.`,
      `/scales/${id}`,
      "Check it",
      "warn",
    );
  }
  if (waiting.bagsToWeigh > 0) {
    add(
      "weigh",
      `${counted(waiting.bagsToWeigh, "bag was", "bags were")} picked up and not weighed in yet.`,
      "/weigh-in",
      "Weigh in",
    );
  }
  if (waiting.bagsToSort.bags > 0) {
    const { bags, grams } = waiting.bagsToSort;
    add(
      "sort",
      `${counted(bags, "bag waits", "bags wait")} to be sorted, ${formatKg(grams, 1)}\u00a0kg.`,
      "/sorting",
      "Sort",
    );
  }
  if (waiting.sessionsAside > 0) {
    add(
      "aside",
      `${counted(waiting.sessionsAside, "sorting was", "sortings were")} put aside.`,
      "/sorting",
      "Take up",
    );
  }
  if (!leading) return lines;
  if (leading.readingsToReview > 0) {
    add(
      "readings",
      `${counted(leading.readingsToReview, "second reading waits", "second readings wait")} for your word.`,
      "/weigh-ins/for-review",
      "Decide",
    );
  }
  if (leading.countsToReview > 0) {
    add(
      "counts",
      `${counted(leading.countsToReview, "count waits", "counts wait")} to be looked at.`,
      "/counts",
      "Look",
    );
  }
  if (leading.receiptsMissing > 0) {
    add(
      "receipts",
      `${counted(leading.receiptsMissing, "load", "loads")} passed on without the receiver's receipt.`,
      "/removals",
      "Enter receipts",
    );
  }
  return lines;
}

/** What was done since midnight, as short sentences; empty when nothing was. */
export function doneLines({ weighed, sorted, steps, counts, removals }: DoneToday): string[] {
  const lines: string[] = [];
  if (weighed.bags > 0) {
    lines.push(
      `${counted(weighed.bags, "bag", "bags")} weighed in, ${formatKg(weighed.grams, 1)}\u00a0kg`,
    );
  }
  if (sorted.sessions > 0) {
    lines.push(
      `${counted(sorted.sessions, "sorting", "sortings")} saved, ${formatKg(sorted.grams, 1)}\u00a0kg`,
    );
  }
  if (steps > 0) lines.push(`${counted(steps, "step", "steps")} done`);
  if (counts > 0) lines.push(`${counted(counts, "lot", "lots")} counted`);
  if (removals.count > 0) {
    lines.push(
      `${counted(removals.count, "load", "loads")} taken away, ${formatKg(removals.grams, 1)}\u00a0kg`,
    );
  }
  return lines;
}
