/** The shed of one random history: what there is, the real ledger, and the plain model beside it. */
import { AppError, type ErrorCode } from "@/lib/core/errors";
import type { Form, Kind, Polymer } from "@/lib/core/plastics";
import { day, type Instant, instant } from "@/lib/core/time";
import { ensureHolder, ensureMaterial, ensureOrigin } from "@/lib/ledger/commands/define";
import {
  correctAct,
  postAct,
  reverseAct,
  type ActMeta,
  type Draft,
} from "@/lib/ledger/commands/post";
import type { HolderKind, OriginType } from "@/lib/ledger/terms";
import { inTransaction } from "@/lib/platform/database";
import { emptyBook, heldIn, type Book } from "@/tests/support/plain-model/movements";
import { correctPlain, postPlain, type PlainDraft } from "@/tests/support/plain-model/posting";
import { NOON, type TestScheme } from "@/tests/support/scheme";

export type Lot = { holder: number; material: number; polymer: Polymer; form: Form; kind: Kind };
export type Run = { holder: number; batch: number };
export type Act = {
  id: number;
  drafts: Draft[];
  /** "gone": an undo, or taken back already. */
  state: "stands" | "gone" | "undo";
  /** How many corrections led to it. */
  corrections: number;
};

export type World = {
  scheme: TestScheme;
  book: Book;
  origins: { no: number; type: OriginType }[];
  lots: Lot[];
  bin: number;
  bags: number[];
  runs: Run[];
  acts: Act[];
  /** How many acts were refused for leaving a holder short. */
  refusals: number;
  /** What was done, for the message of a failing history. */
  story: string[];
};

const MATERIALS: { polymer: Polymer; kind: Kind; colour: string; form: Form }[] = [
  { polymer: "PE-HD", kind: "lids", colour: "blue", form: "whole" },
  { polymer: "PE-HD", kind: "lids", colour: "red", form: "whole" },
  { polymer: "PE-HD", kind: "lids", colour: "blue", form: "flake" },
  { polymer: "PE-HD", kind: "lids", colour: "red", form: "flake" },
  { polymer: "PE-HD", kind: "regrind", colour: "mixed", form: "flake" },
  { polymer: "PP", kind: "tubs", colour: "white", form: "whole" },
  { polymer: "PP", kind: "tubs", colour: "white", form: "flake" },
];

const META: ActMeta = { now: NOON, doneBy: "tester", sentBy: "tester", device: null };

export function newHolder(world: World, kind: HolderKind, code: string): number {
  return inTransaction(world.scheme.ctx("system"), (tx) => ensureHolder(tx, kind, code));
}

/** Two lots of each material, four points, a collector, bought-in material, one reject bin. */
export function newWorld(scheme: TestScheme): World {
  return inTransaction(scheme.ctx("system"), (tx) => {
    const rowOf = new Map<number, number>();
    const lots = MATERIALS.flatMap(({ polymer, kind, colour, form }, index) => {
      const wash = form === "whole" ? "as-received" : "dry";
      const material = ensureMaterial(tx, { polymer, kind, colourCode: colour, form, wash });
      return ["A", "B"].map((twin) => {
        const holder = ensureHolder(tx, "lot", `LOT${index}${twin}`);
        return { holder, material, polymer, form, kind };
      });
    });
    for (const { id, row } of tx.client
      .prepare("select id, row_id as row from materials")
      .all() as {
      id: number;
      row: number;
    }[]) {
      rowOf.set(id, row);
    }
    const point = tx.client.prepare(
      "insert into points (id, name, kind, created_at) values (?, ?, 'other', ?)",
    );
    const origins = ["library", "school", "boatyard", "café"].map(
      (name): World["origins"][number] => {
        point.run(name, name, NOON);
        return { no: ensureOrigin(tx, "donated", name), type: "donated" };
      },
    );
    for (const type of ["collector", "bought"] as const) {
      origins.push({ no: ensureOrigin(tx, type, null), type });
    }
    const typeOf = new Map<number, OriginType>([
      [0, "unknown"],
      ...origins.map(({ no, type }) => [no, type] as const),
    ]);
    return {
      scheme,
      origins,
      lots,
      bin: ensureHolder(tx, "reject-bin", "REJECT-BIN-1"),
      bags: [],
      runs: [],
      acts: [],
      refusals: 0,
      story: [],
      book: emptyBook({
        rowOf: (material) => rowOf.get(material) ?? NaN,
        typeOf: (origin) => typeOf.get(origin) ?? "unknown",
      }),
    };
  });
}

export const held = (world: World, holder: number, material: number): number =>
  heldIn(world.book, holder, material);

export function noonOf(trueDay: string): Instant {
  return instant(Date.parse(`${day(trueDay)}T12:00:00Z`));
}

function plain(drafts: readonly Draft[]): PlainDraft[] {
  return drafts.map(({ kind, occurredAt, lines }) => ({
    kind,
    lines,
    day: new Date(occurredAt).toISOString().slice(0, 10),
  }));
}

/** What a call did: its answer, or the code that it was refused with. */
function attempt<T>(call: () => T): { did: T } | { refused: ErrorCode } {
  try {
    return { did: call() };
  } catch (error) {
    if (error instanceof AppError) return { refused: error.code };
    throw error;
  }
}

function agree(what: string, real: unknown, model: unknown): void {
  if (real !== model) {
    throw new Error(`${what}: the ledger says ${String(real)}, the plain model ${String(model)}`);
  }
}

/** Posts to both. An act that leaves a holder short must be refused by both, as `ledger-short`. */
export function post(world: World, drafts: Draft[]): void {
  const ctx = world.scheme.ctx("system");
  const expected = postPlain(world.book, plain(drafts));
  const real = attempt(() => inTransaction(ctx, (tx) => postAct(tx, META, drafts)));
  agree(
    "refusal",
    "refused" in real ? real.refused : null,
    expected === null ? "ledger-short" : null,
  );
  if ("refused" in real || expected === null) {
    world.refusals += 1;
    return;
  }
  agree("act", real.did.actId, expected);
  world.acts.push({ id: expected, drafts, state: "stands", corrections: 0 });
}

/** Takes an act back, with a replacement or (no drafts) without. */
export function takeBack(world: World, act: Act, drafts: Draft[]): void {
  const ctx = world.scheme.ctx("system");
  const wrong = { actId: act.id, subject: "history:correction" };
  const real = attempt(() =>
    inTransaction(ctx, (tx) =>
      drafts.length === 0 ? reverseAct(tx, META, wrong) : correctAct(tx, META, wrong, drafts),
    ),
  );
  const refusal = { undo: "ledger-correction-of-reversal", gone: "undone-already", stands: null };
  agree("refusal", "refused" in real ? real.refused : null, refusal[act.state]);
  if ("refused" in real) return;
  const expected = correctPlain(world.book, act.id, plain(drafts));
  agree("act", real.did.actId, expected);
  act.state = "gone";
  world.acts.push({
    id: expected,
    drafts,
    state: drafts.length === 0 ? "undo" : "stands",
    corrections: drafts.length === 0 ? 0 : act.corrections + 1,
  });
}

/** Closes the month after the last closed one (the first: January 2026). */
export function closeMonth(world: World): void {
  const { book, scheme } = world;
  const next = book.lastClosed === null ? 1 : Number(book.lastClosed.slice(5)) + 1;
  if (next > 5) return;
  book.lastClosed = `2026-0${next}`;
  scheme.db.writer.client
    .prepare(
      "insert into periods (month, closed_entry, head_hash, snapshot, closed_by) values (?, ?, 'head', '{}', 'tester')",
    )
    .run(book.lastClosed, book.entries.length);
}
