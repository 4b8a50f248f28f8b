/** What two people type at one table: nothing is lost, whoever is first. */
import { describe, expect, it } from "vitest";
import {
  EMPTY_DRAFT,
  newPile,
  newReject,
  type Draft,
  type PileDraft,
} from "@/components/sorting/draft";
import {
  hear,
  isUnkept,
  joinTables,
  maySend,
  openedState,
  type SessionState,
} from "@/components/sorting/session-state";
import { draftText, readDraftText, sameTable, type Table } from "@/components/sorting/table-text";
import type { SortingDraft } from "@/lib/sorting/contract/drafts";

const pile = (id: string, gross: string, fields: Partial<PileDraft> = {}): PileDraft => ({
  ...newPile(undefined),
  id,
  polymer: "PE-HD",
  colourCode: "blue",
  kind: "lids",
  ...fields,
  reading: { ...newPile(undefined).reading, gross },
});
const draftOf = (...piles: PileDraft[]): Draft => ({ ...EMPTY_DRAFT, piles });
const tableOf = (codes: string[], ...piles: PileDraft[]): Table => ({
  codes,
  draft: draftOf(...piles),
});

const answer = (version: number, { codes, draft }: Table, who = "Ada"): SortingDraft => ({
  id: "s",
  version,
  codes: [...codes],
  content: draftText(draft),
  startedAt: 0,
  changedAt: 0,
  changedBy: { id: who, name: who },
  others: [{ id: who, name: who }],
});

const ONE = tableOf(["A"], pile("1", "1.2"));
/** Opened on what the server has in version 1. */
const opened = (): SessionState => openedState(ONE, { version: 1, table: ONE });
const typed = (state: SessionState, table: Table) => hear(state, { kind: "typed", table });

describe("what is kept of a table", () => {
  it("comes back from its text as it was", () => {
    const draft: Draft = {
      scaleId: "s1",
      piles: [pile("1", "1,2", { lot: 118 }), pile("2", "", { lot: "new", polymer: "" })],
      rejects: [{ ...newReject(undefined), id: "3", reason: "food" }],
    };
    expect(readDraftText(draftText(draft))).toEqual(draft);
  });

  it("is read with mistrust: another version may have written it", () => {
    expect(readDraftText("not json")).toEqual(EMPTY_DRAFT);
    expect(readDraftText("[1]")).toEqual(EMPTY_DRAFT);
    const odd = JSON.stringify({
      piles: [
        { id: "1", polymer: "mixed", kind: 7, lot: 1.5, reading: null },
        { polymer: "PP" },
        3,
      ],
      rejects: "none",
    });
    expect(readDraftText(odd)).toEqual({
      scaleId: "",
      piles: [
        {
          ...newPile(undefined),
          id: "1",
          reading: {
            gross: "",
            container: { choice: "", text: "" },
            sack: { choice: "", text: "" },
          },
        },
      ],
      rejects: [],
    });
  });

  it("does not change with the order of its bags", () => {
    expect(sameTable(tableOf(["A", "B"]), tableOf(["B", "A"]))).toBe(true);
    expect(sameTable(tableOf(["A"]), tableOf(["B"]))).toBe(false);
    expect(sameTable(ONE, tableOf(["A"], pile("1", "1.3")))).toBe(false);
  });
});

describe("keeping it on the server", () => {
  it("is wanted for what the server does not have, and builds on the version it made", () => {
    let state = opened();
    expect(maySend(state)).toBe(false);
    const more = tableOf(["A"], pile("1", "1.2"), pile("2", "0.5"));
    state = typed(state, more);
    expect(maySend(state)).toBe(true);
    state = hear(state, { kind: "kept", answer: answer(2, more), sent: more });
    expect(state).toMatchObject({ base: { version: 2 }, reached: true, others: ["Ada"] });
    expect(isUnkept(state)).toBe(false);
  });

  it("stops at a bag that cannot lie here until it is taken off", () => {
    const both = tableOf(["A", "B"], pile("1", "1.2"));
    const bag = { code: "B", why: "sorted" as const, sentence: "Sorted already." };
    let state = hear(typed(opened(), both), { kind: "refused", bag });
    expect(maySend(state)).toBe(false);
    // Another pile does not mend it, and is kept.
    state = typed(state, tableOf(["A", "B"], pile("1", "1.2"), pile("2", "0.1")));
    expect(state.refused).toEqual(bag);
    state = typed(state, { ...state.table, codes: ["A"] });
    expect(state.refused).toBeNull();
    expect(state.table.draft.piles).toHaveLength(2);
    expect(maySend(state)).toBe(true);
  });

  it("ends when the session was saved or given up, and what is typed stays", () => {
    const more = tableOf(["A"], pile("1", "1.2"), pile("2", "0.5"));
    const state = hear(typed(opened(), more), { kind: "over", how: "given-up" });
    expect(state).toMatchObject({ table: more, over: "given-up" });
    expect(maySend(state)).toBe(false);
  });

  it("knows again what was sent when only the answer was lost", () => {
    const sent = tableOf(["A"], pile("1", "1.2"), pile("2", "0.5"));
    let state = hear(typed(opened(), sent), { kind: "sending" });
    state = hear(state, { kind: "unreached" });
    expect(state.reached).toBe(false);
    const later = tableOf(["A"], pile("1", "1.2"), pile("2", "0.6"));
    state = hear(typed(state, later), { kind: "met", answer: answer(2, sent, "Me") });
    expect(state).toMatchObject({ theirs: null, base: { version: 2 }, reached: true });
    expect(state.table).toEqual(later);
    expect(maySend(state)).toBe(true);
  });
});

describe("two at one table", () => {
  const theirs = tableOf(["A"], pile("1", "1.2"), pile("2", "0.5"));
  const mine = tableOf(["A"], pile("1", "1.2"), pile("3", "0.3"));

  it("takes over what the other typed while nothing was typed here", () => {
    const state = hear(opened(), { kind: "met", answer: answer(2, theirs) });
    expect(state.table).toEqual(theirs);
    expect(state).toMatchObject({ theirs: null, base: { version: 2 }, others: ["Ada"] });
  });

  it("takes no notice of a version that it has", () => {
    const state = typed(opened(), mine);
    expect(hear(state, { kind: "met", answer: answer(1, ONE) }).table).toEqual(mine);
  });

  const overtaken = () => hear(typed(opened(), mine), { kind: "met", answer: answer(2, theirs) });

  it("lays the other's beside one's own, and sends nothing until somebody chose", () => {
    const state = overtaken();
    expect(state.theirs).toMatchObject({ who: "Ada", version: 2, table: theirs });
    expect(state.table).toEqual(mine);
    expect(maySend(state)).toBe(false);
  });

  it("keeps what was not chosen, to be brought back", () => {
    let state = hear(overtaken(), { kind: "chose", which: "theirs" });
    expect(state).toMatchObject({ table: theirs, aside: mine, theirs: null });
    expect(maySend(state)).toBe(false);
    state = hear(state, { kind: "took-aside" });
    expect(state).toMatchObject({ table: mine, aside: theirs });
    // It builds on the other's version, so that it is not refused.
    expect(state.base.version).toBe(2);
    expect(maySend(state)).toBe(true);
    expect(hear(overtaken(), { kind: "chose", which: "mine" })).toMatchObject({
      table: mine,
      aside: theirs,
      base: { version: 2 },
    });
  });

  it("puts both on one table by the piles' ids", () => {
    const { table } = hear(overtaken(), { kind: "chose", which: "both" });
    expect(table.draft.piles.map(({ id }) => id)).toEqual(["1", "2", "3"]);
  });
});

describe("joining two tables", () => {
  const base = tableOf(["A", "B"], pile("1", "1.0"), pile("2", "2.0"), pile("3", "3.0"));
  const grams = (table: Table) =>
    Object.fromEntries(table.draft.piles.map(({ id, reading }) => [id, reading.gross]));

  it("takes each change once, whoever made it", () => {
    const mine = tableOf(
      ["A", "B", "C"],
      pile("1", "1.1"),
      pile("2", "2.0"),
      pile("3", "3.0"),
      pile("4", "4.0"),
    );
    const theirs = tableOf(["A"], pile("1", "1.0"), pile("2", "2.2"), pile("5", "5.0"));
    const joined = joinTables(base, mine, theirs);
    // B was taken off by the other, C put on here; 3 taken off by the other, unchanged here.
    expect([...joined.codes].sort()).toEqual(["A", "C"]);
    expect(grams(joined)).toEqual({ 1: "1.1", 2: "2.2", 4: "4.0", 5: "5.0" });
  });

  it("keeps one's own where both changed one pile, and what was changed over what was taken off", () => {
    const mine = tableOf(["A", "B"], pile("1", "1.1"), pile("3", "3.3"));
    const theirs = tableOf(["A", "B"], pile("1", "1.2"), pile("2", "2.2"));
    expect(grams(joinTables(base, mine, theirs))).toEqual({ 1: "1.1", 2: "2.2", 3: "3.3" });
  });
});
