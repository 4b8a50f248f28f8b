/** Mail is a row written in the transaction that causes it: no mail without the deed, no deed without. */
import "server-only";
import type { Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";

/** One person's mail; plain text. */
export type Mail = { to: string; subject: string; body: string };

/** Queues a mail. The body may hold a link's token, which is why it is emptied once sent. */
export function queueMailIn(tx: Tx, ctx: Context, mail: Mail): void {
  prepared(
    tx.client,
    `insert into outbox (to_address, subject, body, created_at, attempts, next_attempt_at)
     values (?, ?, ?, ?, 0, ?)`,
  ).run(mail.to, mail.subject, mail.body, ctx.now, ctx.now);
}

/** Forgets an address: waiting mail to it is withdrawn, sent mail keeps its row without the address. */
export function eraseMailIn(tx: Tx, address: string): void {
  prepared(tx.client, "delete from outbox where to_address = ? and sent_at is null").run(address);
  prepared(tx.client, "update outbox set to_address = '' where to_address = ?").run(address);
}
