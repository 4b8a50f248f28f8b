/** Sorting sessions: which bags were tipped, and into which piles and rejects they went. */
import { sql } from "drizzle-orm";
import {
  check,
  index,
  integer,
  primaryKey,
  sqliteTable,
  text,
  uniqueIndex,
} from "drizzle-orm/sqlite-core";
import { LOSS_CAUSES } from "@/lib/ledger/terms";
import { DRAFT_STATES, SORTING_STATES } from "@/lib/sorting/terms";
import {
  gramsColumn,
  idColumn,
  instantColumn,
  milligramsColumn,
  oneOf,
  wholeNumbers,
} from "../columns";
import { bags } from "./bags";
import { people } from "./identity";
import { materials } from "./ledger";
import { scales } from "./scales";
import { lots } from "./stock";

export const rejectReasons = sqliteTable(
  "reject_reasons",
  {
    code: text("code").primaryKey(),
    name: text("name").notNull().unique(),
    /** Shows "Stop, gloves, set aside". */
    warning: integer("warning", { mode: "boolean" }).notNull(),
    position: integer("position").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [wholeNumbers("reject_reasons_whole_numbers", t.position, t.retiredAt)],
);

export const sortingSessions = sqliteTable(
  "sorting_sessions",
  {
    id: idColumn<"sorting">("id").primaryKey(),
    state: text("state", { enum: SORTING_STATES }).notNull(),
    doneBy: idColumn<"person">("done_by")
      .notNull()
      .references(() => people.id),
    occurredAt: instantColumn("occurred_at").notNull(),
    recordedAt: instantColumn("recorded_at").notNull(),
    netGrams: gramsColumn("net_grams").notNull(),
    /** Net less the sum of piles and rejects. */
    differenceGrams: gramsColumn("difference_grams").notNull(),
    toleranceMilligrams: milligramsColumn("tolerance_mg").notNull(),
    /** Named when the difference is beyond tolerance; it is then a loss. */
    cause: text("cause", { enum: LOSS_CAUSES }),
    actId: integer("act_id").notNull(),
    undoneActId: integer("undone_act_id"),
    /** The session in whose place it stands. */
    corrects: idColumn<"sorting">("corrects"),
  },
  (t) => [
    oneOf("sorting_sessions_state", t.state, SORTING_STATES),
    wholeNumbers(
      "sorting_sessions_whole_numbers",
      t.netGrams,
      t.differenceGrams,
      t.toleranceMilligrams,
      t.occurredAt,
      t.recordedAt,
      t.actId,
      t.undoneActId,
    ),
    index("sorting_sessions_recorded").on(t.recordedAt),
  ],
);

export const sortingBags = sqliteTable(
  "sorting_bags",
  {
    sessionId: idColumn<"sorting">("session_id")
      .notNull()
      .references(() => sortingSessions.id),
    bagId: idColumn<"bag">("bag_id")
      .notNull()
      .references(() => bags.id),
    /** False once the session is undone. */
    live: integer("live", { mode: "boolean" }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.sessionId, t.bagId] }),
    uniqueIndex("sorting_bags_one_live")
      .on(t.bagId)
      .where(sql`${t.live} = 1`),
  ],
);

/**
 * A session under way: what was typed so far, kept on the server so that it can be put aside and taken up on
 * another phone. Nothing of it is in the ledger; saving makes a row of sorting_sessions with the same id.
 */
export const sortingDrafts = sqliteTable(
  "sorting_drafts",
  {
    id: idColumn<"sorting">("id").primaryKey(),
    state: text("state", { enum: DRAFT_STATES }).notNull(),
    startedBy: idColumn<"person">("started_by")
      .notNull()
      .references(() => people.id),
    startedAt: instantColumn("started_at").notNull(),
    changedBy: idColumn<"person">("changed_by")
      .notNull()
      .references(() => people.id),
    changedAt: instantColumn("changed_at").notNull(),
    /** Goes up with every change: who sends an older one is told what the other typed. */
    version: integer("version").notNull(),
    /** JSON of scale, piles, rejects and answers as they were typed. */
    content: text("content").notNull(),
  },
  (t) => [
    oneOf("sorting_drafts_state", t.state, DRAFT_STATES),
    wholeNumbers("sorting_drafts_whole_numbers", t.startedAt, t.changedAt, t.version),
    index("sorting_drafts_open")
      .on(t.changedAt)
      .where(sql`${t.state} = 'open'`),
  ],
);

export const sortingDraftBags = sqliteTable(
  "sorting_draft_bags",
  {
    draftId: idColumn<"sorting">("draft_id")
      .notNull()
      .references(() => sortingDrafts.id),
    bagId: idColumn<"bag">("bag_id")
      .notNull()
      .references(() => bags.id),
    /** False once the draft was saved, given up, or the bag was taken off the table. */
    live: integer("live", { mode: "boolean" }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.draftId, t.bagId] }),
    uniqueIndex("sorting_draft_bags_one_live")
      .on(t.bagId)
      .where(sql`${t.live} = 1`),
  ],
);

/** Who has a draft open at this moment: two people who sort the same bags see each other's name. */
export const sortingPresence = sqliteTable(
  "sorting_presence",
  {
    draftId: idColumn<"sorting">("draft_id")
      .notNull()
      .references(() => sortingDrafts.id),
    personId: idColumn<"person">("person_id")
      .notNull()
      .references(() => people.id),
    seenAt: instantColumn("seen_at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.draftId, t.personId] }),
    wholeNumbers("sorting_presence_whole_numbers", t.seenAt),
  ],
);

/** A pile of a session, or a reject: a pile has a lot, a reject has a reason. */
export const fractions = sqliteTable(
  "fractions",
  {
    sessionId: idColumn<"sorting">("session_id")
      .notNull()
      .references(() => sortingSessions.id),
    seq: integer("seq").notNull(),
    lotId: idColumn<"lot">("lot_id").references(() => lots.id),
    materialId: integer("material_id")
      .notNull()
      .references(() => materials.id),
    rejectReason: text("reject_reason").references(() => rejectReasons.code),
    scaleId: idColumn<"scale">("scale_id")
      .notNull()
      .references(() => scales.id),
    grossMilligrams: milligramsColumn("gross_mg").notNull(),
    tareMilligrams: milligramsColumn("tare_mg").notNull(),
    netGrams: gramsColumn("net_grams").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.sessionId, t.seq] }),
    check("fractions_pile_or_reject", sql`(${t.lotId} is null) = (${t.rejectReason} is not null)`),
    check("fractions_net", sql`${t.netGrams} > 0`),
    wholeNumbers("fractions_whole_numbers", t.seq, t.grossMilligrams, t.tareMilligrams, t.netGrams),
    index("fractions_lot").on(t.lotId),
  ],
);
