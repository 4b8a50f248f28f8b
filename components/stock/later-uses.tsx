import type * as z from "zod";
import { Notice } from "@/components/ui/notice";
import { formatKg } from "@/lib/core/mass";
import type { laterUsesSchema } from "@/lib/core/schemas";
import { ENTRY_WORDS, isEntryKind } from "@/lib/stock/rules/entry-words";

type Props = { later: z.output<typeof laterUsesSchema>; title: string };

/** What was taken since from what a corrected record had filled: named, because those records stay as they are. */
export function LaterUses({ later: { uses, count }, title }: Props) {
  return (
    <Notice tone={count > 0 ? "warn" : "ok"} title={title} live="status">
      {count === 0 ? (
        "Nothing had been taken from it since."
      ) : (
        <>
          <p>Taken from it since, and left as it is:</p>
          <ul className="mt-1 list-inside list-disc">
            {uses.map((use) => (
              <li key={use.entryId}>
                {isEntryKind(use.kind) ? ENTRY_WORDS[use.kind] : use.kind}, entry {use.entryId}:{" "}
                <span className="font-mono">{formatKg(use.grams)}</span> kg
              </li>
            ))}
            {count > uses.length ? <li>and {count - uses.length} more</li> : null}
          </ul>
        </>
      )}
    </Notice>
  );
}
