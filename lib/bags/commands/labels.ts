/** Codes of everything that can be scanned: one table, so that no code is given twice. */
import "server-only";
import { randomInt } from "node:crypto";
import { drawCode, type LabelCode } from "@/lib/core/bag-code";
import type { Instant } from "@/lib/core/time";
import { prepared, type Tx } from "@/lib/platform/database";
import type { LabelKind } from "../terms";

/**
 * Draws a code that nothing has yet and notes what it stands for. A collision (32^7 codes; still likely
 * once in a scheme's life) draws again.
 *
 * @param subject id of the bag, lot, container, run or batch
 * @param random the system's random source; a test passes its own
 */
export function makeLabelIn(
  tx: Tx,
  kind: LabelKind,
  subject: string,
  now: Instant,
  random: (below: number) => number = (below) => randomInt(below),
): LabelCode {
  const insert = prepared(
    tx.client,
    "insert into labels (code, kind, subject, made_at) values (?, ?, ?, ?) on conflict (code) do nothing",
  );
  for (;;) {
    const code = drawCode(random);
    if (insert.run(code, kind, subject, now).changes === 1) return code;
  }
}
