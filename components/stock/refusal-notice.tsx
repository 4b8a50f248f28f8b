"use client";

import { useEffect, useRef } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { Notice } from "@/components/ui/notice";
import type { ErrorCode, ProblemDocument } from "@/lib/core/errors";

type Props = {
  command: { problem: ProblemDocument | null; unreachable: boolean };
  /** Codes that the form answers with a question of its own. */
  except?: readonly ErrorCode[];
};

/** Why it was not saved, in full: what is wrong, what was kept, what to do. It comes into sight by itself. */
export function RefusalNotice({ command: { problem, unreachable }, except = [] }: Props) {
  const place = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (problem || unreachable) place.current?.scrollIntoView({ block: "nearest" });
  }, [problem, unreachable]);
  if (!unreachable && (!problem || except.includes(problem.code))) return null;
  const said =
    problem?.code === "invalid" ? (problem.errors?.[0]?.detail ?? problem.detail) : problem?.detail;
  return (
    <div ref={place} className="scroll-mt-20 scroll-mb-28">
      <Notice
        tone={unreachable ? "warn" : "bad"}
        title={unreachable ? "No answer" : "Not saved"}
        live="alert"
      >
        {unreachable ? UNANSWERED_SENTENCE : said}
      </Notice>
    </div>
  );
}
