"use client";

import { useRouter } from "next/navigation";
import { Button } from "@/components/ui/button";
import { newId } from "@/lib/core/ids";
import type { SortingPage } from "@/lib/sorting/queries/session-page";
import { draftFrom } from "./from-fractions";
import { keepTable } from "./kept-tables";
import { NOTHING_KEPT } from "./session-state";

type Props = { session: SortingPage; helperId: string };

/** After an undo: the same bags on a new table, with the weights that were read. */
export function SortAgain({ session, helperId }: Props) {
  const router = useRouter();
  function start() {
    const id = newId();
    const codes = session.bags.map(({ code }) => code);
    const draft = draftFrom(session.fractions, session.scale?.id ?? "", { lots: "open" });
    keepTable(helperId, { id, table: { codes, draft }, base: NOTHING_KEPT });
    router.push(`/sorting/table/${id}?bags=${codes.join(".")}`);
  }
  return <Button onClick={start}>Sort again, with these weights</Button>;
}
