/**
 * A process of its own that reserves for run after run, as fast as it can, once a line comes in: two of them race for
 * the same lots. Prints what it was answered as JSON.
 */
import { createHash, randomUUID } from "node:crypto";
import { openDb } from "@/db/client";
import { AppError } from "@/lib/core/errors";
import { newId, type Id, type PersonId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { reserve } from "@/lib/production/commands/reserve";

export type Answer = { grams: number } | { refused: string };

const [file = "", leadId = "", at = "", ...runIds] = process.argv.slice(2);
const db = openDb(file);
const now = instant(Number(at));

process.stdin.once("data", () => {
  const answers = runIds.map((runId): Answer => {
    const input = { requestId: newId(now), runId: runId as Id<"run"> };
    try {
      const { grams } = reserve(
        {
          actor: { kind: "person", id: leadId as PersonId, role: "lead", sessionId: null },
          now,
          requestId: randomUUID(),
          bodyHash: createHash("sha256").update(JSON.stringify(input)).digest("hex"),
          address: null,
          db,
        },
        input,
      );
      return { grams };
    } catch (error) {
      if (error instanceof AppError) return { refused: error.code };
      throw error;
    }
  });
  db.close();
  console.log(JSON.stringify(answers));
});
console.log("ready");
