"use client";

import Link from "next/link";
import { Button } from "@/components/ui/button";
import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import { formatCode } from "@/lib/core/bag-code";
import type { SessionState } from "./session-state";

/** "Ada", "Ada and Ben", "Ada, Ben and Cem" */
export function namesTogether(names: readonly string[]): string {
  const [last, ...before] = [...names].reverse();
  if (last === undefined) return "";
  return before.length === 0 ? last : `${before.reverse().join(", ")} and ${last}`;
}

type Props = {
  state: SessionState;
  /** Of the session, and of its record once it is saved. */
  id: string;
  onTakeOff: (code: string) => void;
  onTakeAside: () => void;
  /** What is typed goes on as a session of its own. */
  onGoOn: () => void;
};

/** Who else is here, and what keeps the table from being kept or saved. */
export function SessionNotices({ state, id, onTakeOff, onTakeAside, onGoOn }: Props) {
  const { others, refused, aside, over } = state;
  return (
    <>
      {others.length > 0 ? (
        <p role="status" className="rounded-control bg-act-soft px-4 py-2.5 font-bold">
          {namesTogether(others)} {others.length === 1 ? "has" : "have"} this open too.
        </p>
      ) : null}
      {over ? (
        <Notice
          tone="warn"
          title={over === "saved" ? "It was saved meanwhile" : "It was given up meanwhile"}
          live="alert"
          action={
            over === "saved" ? (
              <ButtonLink href={`/sorting/sessions/${id}`} size="small">
                See what was saved
              </ButtonLink>
            ) : (
              <Button size="small" onClick={onGoOn}>
                Go on with this
              </Button>
            )
          }
        >
          {over === "saved"
            ? "The first to save counts. What you typed is still here and was not saved; compare it with what was."
            : "Its bags wait again. What you typed is still here and was not saved."}
        </Notice>
      ) : null}
      {refused ? (
        <Notice
          tone="bad"
          title="This bag cannot be sorted here"
          live="alert"
          action={
            refused.code ? (
              <>
                <Button size="small" onClick={() => onTakeOff(refused.code)}>
                  Take {formatCode(refused.code)} off
                </Button>
                {refused.why === "other" ? null : (
                  <Link
                    href={`/sorting/${refused.code}`}
                    className="link inline-flex min-h-11 items-center px-2 font-bold"
                  >
                    {refused.why === "sorted" ? "See how it was sorted" : "Go to that session"}
                  </Link>
                )}
              </>
            ) : null
          }
        >
          {refused.sentence}
        </Notice>
      ) : null}
      {aside ? (
        <Notice
          tone="info"
          title="The other table is kept here"
          action={
            <Button variant="quiet" size="small" onClick={onTakeAside}>
              Bring it back
            </Button>
          }
        >
          Until this is saved, you can change between the two.
        </Notice>
      ) : null}
    </>
  );
}
