/** Short-hand for ledger tests: holders, materials and origins by name, and what they hold. */
import { ensureHolder, ensureMaterial, ensureOrigin } from "@/lib/ledger/commands/define";
import {
  correctAct,
  postAct,
  reverseAct,
  type ActMeta,
  type Draft,
} from "@/lib/ledger/commands/post";
import { loadHolding } from "@/lib/ledger/queries/entries";
import { partsOf } from "@/lib/ledger/rules/holding";
import type { Form, Kind } from "@/lib/core/plastics";
import { inTransaction } from "@/lib/platform/database";
import { NOON, type TestScheme } from "./scheme";

export function ledgerOf(scheme: TestScheme) {
  const ctx = scheme.ctx("system");
  const meta: ActMeta = { now: NOON, doneBy: "tester", sentBy: "tester", device: null };
  return {
    meta,
    holder: (kind: Parameters<typeof ensureHolder>[1], code: string) =>
      inTransaction(ctx, (tx) => ensureHolder(tx, kind, code)),
    material: (colourCode: string, form: Form = "whole", kind: Kind = "lids") =>
      inTransaction(ctx, (tx) =>
        ensureMaterial(tx, { polymer: "PE-HD", kind, colourCode, form, wash: "as-received" }),
      ),
    origin: (name: string | null) =>
      inTransaction(ctx, (tx) => {
        if (name !== null) {
          tx.client
            .prepare(
              "insert or ignore into points (id, name, kind, created_at) values (?, ?, 'other', ?)",
            )
            .run(name, name, NOON);
        }
        return ensureOrigin(tx, "donated", name);
      }),
    post: (...drafts: Draft[]) => inTransaction(ctx, (tx) => postAct(tx, meta, drafts)),
    reverse: (actId: number) =>
      inTransaction(ctx, (tx) => reverseAct(tx, meta, { actId, subject: "test:undo" })),
    correct: (actId: number, ...drafts: Draft[]) =>
      inTransaction(ctx, (tx) => correctAct(tx, meta, { actId, subject: "test:correct" }, drafts)),
    held: (holderId: number, materialId: number) => {
      const holding = loadHolding(scheme.db.writer, holderId, materialId);
      return {
        grams: holding.grams,
        O: Object.fromEntries(partsOf(holding.O)),
        H: Object.fromEntries(partsOf(holding.H)),
      };
    },
  };
}
