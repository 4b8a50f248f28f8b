/**
 * The yardstick of saving: the rows that a weigh-in writes, written by hand with better-sqlite3 and nothing
 * else: no session, no contract, no rules, no splitting. Same pragmas, same transaction, same rows.
 */
import { createHash } from "node:crypto";
import Database from "better-sqlite3";

const TOTALS = `held, collected, other_in, opening, disposed, passed_proven, passed_unproven, loss, difference,
  pieces, accepted, rejected, bags, before_opening`;

/** @returns {(body: string) => string} saves one weigh-in and answers JSON */
export function saverOf(file) {
  const db = new Database(file, { timeout: 5000 });
  for (const pragma of [
    "journal_mode = WAL",
    "synchronous = FULL",
    "foreign_keys = ON",
    "recursive_triggers = ON",
  ]) {
    db.pragma(pragma);
  }
  const sql = (text) => db.prepare(text);
  const bagOf = sql(
    "select b.id, b.code, b.point_id as pointId from labels l join bags b on b.id = l.subject where l.code = ?",
  );
  const originOf = sql("select no from origins where type = 'donated' and point_id = ?");
  const addOrigin = sql("insert into origins (type, point_id) values ('donated', ?)");
  const headOf = sql("select id, hash from entries order by id desc limit 1");
  const addHolder = sql("insert into holders (kind, code) values ('bag', ?)");
  const addLine = sql(
    "insert into lines (entry_id, seq, account, holder_id, material_id, grams, after, basis, scale_id, mpe_mg) values (?, ?, ?, ?, 1, ?, ?, ?, ?, ?)",
  );
  const addPart = sql("insert into line_parts values (?, ?, ?, ?, ?)");
  const addEntry = sql(
    `insert into entries (id, act_id, kind, rule_version, occurred_at, booked_day, recorded_at, done_by, sent_by, subject,
       line_count, part_count, prev_hash, hash) values (?, ?, 'weigh-in', 1, ?, ?, ?, ?, ?, ?, 2, 4, ?, ?)`,
  );
  const totals = (table, key) =>
    sql(`insert into ${table} (${key}, row_id, origin_no, ${TOTALS}) values (?, 1, ?, ?, ?, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 1, 0)
      on conflict do update set held = held + excluded.held, collected = collected + excluded.collected, bags = bags + 1`);
  const addDay = totals("totals_day", "day");
  const addMonth = totals("totals_month", "month");
  const addScale = sql(
    `insert into totals_scale values (?, 'collected', 'unchecked', 1, ?, 15000)
     on conflict do update set grams = grams + excluded.grams, mpe_mg = mpe_mg + excluded.mpe_mg`,
  );
  const addBalance = sql("insert into balances values (?, 1, ?)");
  const addHeld = sql("insert into parts values (?, 1, ?, ?, ?)");
  const moveBag = sql("update bags set state = 'weighed', state_since = ? where id = ?");
  const addWeighIn = sql(
    `insert into weigh_ins (id, bag_id, point_id, scale_id, done_by, occurred_at, recorded_at, state, net_grams, mpe_mg,
       basis, below_minimum, condition, polymer, one_kind, act_id)
     values (?, ?, ?, ?, ?, ?, ?, 'posted', ?, 15000, 'unchecked', 0, 'clean', 'mixed', 0, ?)`,
  );
  const addReading = sql("insert into weigh_in_readings values (?, 1, ?, null, 0, null, 0)");
  const addAudit = sql(
    "insert into audit_events (at, actor, action, subject_kind, subject_id, fields, act_id) values (?, ?, 'weighing.record', 'weigh-in', ?, '{}', ?)",
  );
  const addReceipt = sql("insert into receipts values (?, ?, 'POST /api/weigh-ins', ?, ?, ?)");

  const save = db.transaction((text) => {
    const body = JSON.parse(text);
    const now = Date.now();
    const day = new Date(now).toISOString().slice(0, 10);
    const grams = Math.round(body.readings[0].grossMilligrams / 1000);
    const bag = bagOf.get(body.code);
    const origin =
      originOf.get(bag.pointId)?.no ?? Number(addOrigin.run(bag.pointId).lastInsertRowid);
    const head = headOf.get() ?? { id: 0, hash: "" };
    const id = head.id + 1;
    const subject = `weigh-in:${body.requestId}`;
    moveBag.run(now, bag.id);
    const holder = Number(addHolder.run(bag.code).lastInsertRowid);
    addLine.run(id, 1, "source", null, -grams, null, "unchecked", 1, 15000);
    addLine.run(id, 2, "bag", holder, grams, grams, null, null, null);
    addPart.run(id, 1, "O", origin, -grams);
    addPart.run(id, 1, "H", 0, -grams);
    addPart.run(id, 2, "O", origin, grams);
    addPart.run(id, 2, "H", 0, grams);
    const hash = createHash("sha256")
      .update(head.hash)
      .update(
        JSON.stringify([id, id, "weigh-in", now, day, body.helper, subject, grams, holder, origin]),
      )
      .digest("hex");
    addEntry.run(id, id, now, day, now, body.helper, body.helper, subject, head.hash, hash);
    addDay.run(day, origin, grams, grams);
    addMonth.run(day.slice(0, 7), origin, grams, grams);
    addScale.run(day.slice(0, 7), grams);
    addBalance.run(holder, grams);
    addHeld.run(holder, "O", origin, grams);
    addHeld.run(holder, "H", 0, grams);
    addWeighIn.run(
      body.requestId,
      bag.id,
      bag.pointId,
      body.scaleId,
      body.helper,
      now,
      now,
      grams,
      id,
    );
    addReading.run(body.requestId, body.readings[0].grossMilligrams);
    addAudit.run(now, body.helper, body.requestId, id);
    const answer = JSON.stringify({ kind: "posted", weighInId: body.requestId, netGrams: grams });
    addReceipt.run(
      body.requestId,
      body.helper,
      createHash("sha256").update(text).digest("hex"),
      answer,
      now,
    );
    return answer;
  });
  return (text) => save.immediate(text);
}
