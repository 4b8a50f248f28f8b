/**
 * Invariant: what one person typed is never thrown away by what another did. Where both changed the same table,
 * the other's lies beside it until somebody chooses, and what was not chosen can still be taken back.
 */
import type { SortingDraft } from "@/lib/sorting/contract/drafts";
import type { Draft } from "./draft";
import { readDraftText, sameTable, type Table } from "./table-text";

/** What the server is known to have; version 0: nothing. */
export type Base = { version: number; table: Table };

/** A bag that cannot lie on this table: sorted already, on another table, not weighed. */
export type RefusedBag = { code: string; why: "sorted" | "elsewhere" | "other"; sentence: string };

export type Ended = "saved" | "given-up";

export type SessionState = {
  table: Table;
  base: Base;
  /** What was sent last: should its answer be lost, it is known again when the server shows it. */
  sent: Table | null;
  /** What another typed meanwhile, to choose from. */
  theirs: (Base & { who: string }) | null;
  /** What was not chosen. */
  aside: Table | null;
  refused: RefusedBag | null;
  /** How it ended: from then on nothing typed here is kept on the server. null: it goes on. */
  over: Ended | null;
  /** The last sending was answered. */
  reached: boolean;
  /** Names of others who have it open. */
  others: readonly string[];
};

export const NOTHING_KEPT: Base = {
  version: 0,
  table: { codes: [], draft: { scaleId: "", piles: [], rejects: [] } },
};

export type Heard =
  /** What this device kept of it. */
  | { kind: "restored"; table: Table; base: Base }
  | { kind: "typed"; table: Table }
  | { kind: "sending" }
  /** The server took what was sent. */
  | { kind: "kept"; answer: SortingDraft; sent: Table }
  /** The draft as the server has it now. */
  | { kind: "met"; answer: SortingDraft }
  | { kind: "unreached" }
  | { kind: "over"; how: Ended }
  | { kind: "refused"; bag: RefusedBag }
  | { kind: "chose"; which: "mine" | "theirs" | "both" }
  | { kind: "took-aside" };

/** A table as it is opened: what this device kept, or the bags that it is started with. */
export function openedState(table: Table, base: Base = NOTHING_KEPT): SessionState {
  return {
    table,
    base,
    sent: null,
    theirs: null,
    aside: null,
    refused: null,
    over: null,
    reached: true,
    others: [],
  };
}

/** Has anything been typed that the server does not have? */
export function isUnkept({ table, base }: Pick<SessionState, "table" | "base">): boolean {
  return !sameTable(table, base.table);
}

/** May it be sent now? Not while somebody has to choose or take a bag off. */
export function maySend(state: SessionState): boolean {
  return isUnkept(state) && !state.theirs && !state.refused && !state.over;
}

const baseOf = (answer: SortingDraft): Base => ({
  version: answer.version,
  table: { codes: answer.codes, draft: readDraftText(answer.content) },
});

const namesOf = (answer: SortingDraft): string[] => answer.others.map(({ name }) => name);

export function hear(state: SessionState, heard: Heard): SessionState {
  switch (heard.kind) {
    case "restored":
      return openedState(heard.table, heard.base);
    case "typed": {
      const sameBags =
        [...heard.table.codes].sort().join() === [...state.table.codes].sort().join();
      return { ...state, table: heard.table, refused: sameBags ? state.refused : null };
    }
    case "sending":
      return { ...state, sent: state.table };
    case "kept":
      return {
        ...state,
        base: { version: heard.answer.version, table: heard.sent },
        others: namesOf(heard.answer),
        reached: true,
      };
    case "met":
      return meet(state, heard.answer);
    case "unreached":
      return { ...state, reached: false };
    case "over":
      return { ...state, over: heard.how, reached: true, theirs: null, refused: null, others: [] };
    case "refused":
      return { ...state, refused: heard.bag, reached: true };
    case "chose":
      return choose(state, heard.which);
    case "took-aside":
      return state.aside ? { ...state, table: state.aside, aside: state.table } : state;
  }
}

function meet(state: SessionState, answer: SortingDraft): SessionState {
  const next = { ...state, others: namesOf(answer), reached: true };
  if (answer.version <= state.base.version) return next;
  const server = baseOf(answer);
  // Nothing of one's own was typed, or the other typed the same: it is simply taken over.
  if (!isUnkept(state) || sameTable(server.table, state.table)) {
    return { ...next, table: server.table, base: server, theirs: null };
  }
  if (state.sent && sameTable(server.table, state.sent)) return { ...next, base: server };
  return { ...next, theirs: { ...server, who: answer.changedBy.name } };
}

function choose(state: SessionState, which: "mine" | "theirs" | "both"): SessionState {
  const { theirs, table, base } = state;
  if (!theirs) return state;
  const on = { ...state, base: { version: theirs.version, table: theirs.table }, theirs: null };
  if (which === "theirs") return { ...on, table: theirs.table, aside: table, refused: null };
  if (which === "mine") return { ...on, aside: theirs.table };
  return { ...on, table: joinTables(base.table, table, theirs.table), aside: null };
}

/**
 * Both on one table, by the piles' own ids: what either added is there, what either took off is gone, and a pile
 * that both changed stays as it is here.
 *
 * @param base what both began with
 */
export function joinTables(base: Table, mine: Table, theirs: Table): Table {
  const codes = new Set([...mine.codes, ...theirs.codes]);
  for (const code of base.codes) {
    if (!mine.codes.includes(code) || !theirs.codes.includes(code)) codes.delete(code);
  }
  return {
    codes: [...codes],
    draft: {
      scaleId: mine.draft.scaleId || theirs.draft.scaleId,
      piles: join(base.draft.piles, mine.draft.piles, theirs.draft.piles),
      rejects: join(base.draft.rejects, mine.draft.rejects, theirs.draft.rejects),
    },
  };
}

function join<One extends Draft["piles"][number] | Draft["rejects"][number]>(
  base: readonly One[],
  mine: readonly One[],
  theirs: readonly One[],
): One[] {
  const find = (list: readonly One[], id: string) => list.find((one) => one.id === id);
  const kept = theirs.flatMap((one) => {
    const own = find(mine, one.id);
    const before = find(base, one.id);
    // It was taken off here: it stays off, unless the other has changed it since.
    if (!own) return before && same(before, one) ? [] : [one];
    return before && same(before, own) ? [one] : [own];
  });
  const added = mine.filter((one) => {
    if (find(theirs, one.id)) return false;
    const before = find(base, one.id);
    // Taken off by the other: it comes back only when it was changed here.
    return !before || !same(before, one);
  });
  return [...kept, ...added];
}

const same = (one: unknown, other: unknown): boolean =>
  JSON.stringify(one) === JSON.stringify(other);
