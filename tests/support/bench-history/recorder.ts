/**
 * What the commands post, as they hand it to the ledger: kept until the command has come back, because a command
 * that throws afterwards has posted nothing.
 */
import type * as Post from "@/lib/ledger/commands/post";
import type { Draft, Reversing } from "@/lib/ledger/commands/post";

export type Recorded =
  | { kind: "post"; drafts: readonly Draft[] }
  | { kind: "correct"; wrong: number; drafts: readonly Draft[] };

let pending: Recorded[] = [];

/** Everything since the last call, and forgets it. */
export function takeRecorded(): Recorded[] {
  const taken = pending;
  pending = [];
  return taken;
}

/** The ledger's writer, writing as ever, with a note of every act. For `vi.mock`. */
export function recording(real: typeof Post): typeof Post {
  const correct = (
    tx: Parameters<typeof real.correctAct>[0],
    meta: Parameters<typeof real.correctAct>[1],
    wrong: Reversing,
    drafts: readonly Draft[],
  ): ReturnType<typeof real.correctAct> => {
    const posted = real.correctAct(tx, meta, wrong, drafts);
    pending.push({ kind: "correct", wrong: wrong.actId, drafts });
    return posted;
  };
  return {
    ...real,
    postAct: (tx, meta, drafts) => {
      const posted = real.postAct(tx, meta, drafts);
      pending.push({ kind: "post", drafts });
      return posted;
    },
    correctAct: correct,
    reverseAct: (tx, meta, act) => correct(tx, meta, act, []),
  };
}
