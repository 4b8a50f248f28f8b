/** What sorting needs before the first bag: the list of reject reasons and the reject bin. */
import "server-only";
import { ensureHolder } from "@/lib/ledger/commands/define";
import { prepared, type Tx } from "@/lib/platform/database";
import { FIRST_REJECT_REASONS, REJECT_BIN_CODE } from "../terms";

/** A step of the scheme's first set-up. Reasons that a coordinator renamed since are left as they are. */
export function setUpSortingIn(tx: Tx): void {
  const insert = prepared(
    tx.client,
    `insert into reject_reasons (code, name, warning, position) values (?, ?, ?, ?)
     on conflict (code) do nothing`,
  );
  FIRST_REJECT_REASONS.forEach((reason, position) => {
    insert.run(reason.code, reason.name, reason.warning ? 1 : 0, position + 1);
  });
  ensureHolder(tx, "reject-bin", REJECT_BIN_CODE);
}
