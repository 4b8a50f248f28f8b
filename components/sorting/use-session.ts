"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import type { ProblemDocument } from "@/lib/core/errors";
import { EMPTY_DRAFT } from "./draft";
import { keepDraft, openDraft } from "./draft-server";
import { forgetTable, keepTable, readKept } from "./kept-tables";
import {
  hear,
  isUnkept,
  maySend,
  openedState,
  type Heard,
  type RefusedBag,
  type SessionState,
} from "./session-state";
import type { Table } from "./table-text";

/** Typing rests this long before it is sent. */
const REST_MS = 1500;
/** Without an answer it is tried again after this long. */
const AGAIN_MS = 10_000;
/** The server forgets who is there after a minute. */
const PRESENT_MS = 20_000;

/** The bag that a refusal is about, by its path "codes.2". */
function refusedBag(problem: ProblemDocument, codes: readonly string[]): RefusedBag | null {
  const error = problem.errors?.find(({ path }) => path[0] === "codes");
  const code = typeof error?.path[1] === "number" ? codes[error.path[1]] : undefined;
  if (!error || code === undefined) return null;
  const why =
    problem.code === "bag-already-sorted"
      ? "sorted"
      : problem.code === "bag-in-other-session"
        ? "elsewhere"
        : "other";
  return { code, why, sentence: error.detail };
}

/** What became of sending what lies on the table. */
export type Kept = "kept" | "unreachable" | "stopped";

export type Session = {
  state: SessionState;
  /** It was asked for; before that nothing can be typed. */
  ready: boolean;
  keeping: boolean;
  type(table: Table): void;
  choose(which: "mine" | "theirs" | "both"): void;
  takeAside(): void;
  /** Sends what is typed at once. */
  keep(): Promise<Kept>;
  /** A refusal of saving that is about one bag, or about the session. */
  hearRefusal(problem: ProblemDocument): void;
  /** It was saved: nothing is kept on this device any more. */
  forget(): void;
};

/**
 * One session under way: what is typed, kept on this device at once and on the server a moment later, and what
 * others do with it meanwhile.
 *
 * @param helperId whose session this is; null while that is not known
 * @param first bags that a new session is started with
 */
export function useSession(id: string, helperId: string | null, first: readonly string[]): Session {
  const [state, setState] = useState(() => openedState({ codes: first, draft: EMPTY_DRAFT }));
  const [ready, setReady] = useState(false);
  const [keeping, setKeeping] = useState(false);
  const latest = useRef(state);
  const sending = useRef<Promise<Kept> | null>(null);
  const forgotten = useRef(false);
  const isNew = first.length > 0;
  // What comes next builds on this at once, not after the next drawing.
  const say = useCallback((heard: Heard) => {
    latest.current = hear(latest.current, heard);
    setState(latest.current);
  }, []);

  const sayOver = useCallback(
    ({ code, values }: ProblemDocument) => {
      if (code !== "draft-over") return;
      say({ kind: "over", how: values.state === "saved" ? "saved" : "given-up" });
    },
    [say],
  );

  useEffect(() => {
    if (helperId === null) return;
    let left = false;
    const kept = readKept(helperId, id);
    // One that is just started is on no server yet; should it be all the same, the first sending says so.
    const asked = isNew && !kept ? Promise.resolve(null) : openDraft(id);
    void asked.then((result) => {
      if (left) return;
      if (kept) say({ kind: "restored", table: kept.table, base: kept.base });
      if (result?.kind === "done") say({ kind: "met", answer: result.answer });
      else if (result?.kind === "unreachable") say({ kind: "unreached" });
      else if (result?.kind === "refused") sayOver(result.problem);
      setReady(true);
    });
    return () => {
      left = true;
    };
  }, [id, helperId, isNew, say, sayOver]);

  useEffect(() => {
    if (!ready || helperId === null || forgotten.current) return;
    const { table, base } = state;
    if (table.codes.length + table.draft.piles.length + table.draft.rejects.length === 0) return;
    keepTable(helperId, { id, table, base });
  }, [ready, helperId, id, state]);

  const send = useCallback(async (): Promise<Kept> => {
    const { table, base } = latest.current;
    if (!maySend(latest.current)) return isUnkept(latest.current) ? "stopped" : "kept";
    say({ kind: "sending" });
    setKeeping(true);
    const result = await keepDraft(id, base.version, table);
    setKeeping(false);
    if (result.kind === "done") {
      say({ kind: "kept", answer: result.answer, sent: table });
      return "kept";
    }
    if (result.kind === "unreachable") {
      say({ kind: "unreached" });
      return "unreachable";
    }
    if (result.problem.code === "draft-over" || result.problem.code === "draft-overtaken") {
      const met = await openDraft(id);
      if (met.kind === "done") say({ kind: "met", answer: met.answer });
      else if (met.kind === "refused") sayOver(met.problem);
    } else {
      const bag = refusedBag(result.problem, table.codes);
      say({
        kind: "refused",
        bag: bag ?? { code: "", why: "other", sentence: result.problem.detail },
      });
    }
    return "stopped";
  }, [id, say, sayOver]);

  /** One sending at a time: the next builds on the version that the last one made. */
  const keep = useCallback(async (): Promise<Kept> => {
    while (sending.current) await sending.current;
    const now = send();
    sending.current = now;
    try {
      return await now;
    } finally {
      sending.current = null;
    }
  }, [send]);

  useEffect(() => {
    if (!ready || !maySend(state)) return;
    const timer = setTimeout(
      () => {
        void keep();
      },
      state.reached ? REST_MS : AGAIN_MS,
    );
    return () => clearTimeout(timer);
  }, [ready, state, keep]);

  const { over } = state;
  const started = state.base.version > 0;
  useEffect(() => {
    if (!ready || over || !started) return;
    const look = () => {
      if (document.visibilityState !== "visible" || sending.current) return;
      void openDraft(id).then((result) => {
        if (sending.current) return;
        if (result.kind === "done") say({ kind: "met", answer: result.answer });
        else if (result.kind === "unreachable") say({ kind: "unreached" });
        else if (!forgotten.current) sayOver(result.problem);
      });
    };
    const timer = setInterval(look, PRESENT_MS);
    document.addEventListener("visibilitychange", look);
    return () => {
      clearInterval(timer);
      document.removeEventListener("visibilitychange", look);
    };
  }, [ready, over, started, id, say, sayOver]);

  return {
    state,
    ready,
    keeping,
    type: useCallback((table: Table) => say({ kind: "typed", table }), [say]),
    choose: useCallback(
      (which: "mine" | "theirs" | "both") => say({ kind: "chose", which }),
      [say],
    ),
    takeAside: useCallback(() => say({ kind: "took-aside" }), [say]),
    keep,
    hearRefusal: useCallback(
      (problem: ProblemDocument) => {
        // This session was saved: by somebody else, or by a sending whose answer was lost.
        if (problem.code === "request-id-reused") {
          say({ kind: "over", how: "saved" });
          return;
        }
        const bag = refusedBag(problem, latest.current.table.codes);
        if (bag) say({ kind: "refused", bag });
      },
      [say],
    ),
    forget: useCallback(() => {
      forgotten.current = true;
      if (helperId !== null) forgetTable(helperId, id);
    }, [helperId, id]),
  };
}
