import { Notice } from "@/components/ui/notice";
import type { ProblemDocument } from "@/lib/core/errors";
import { UNANSWERED_SENTENCE } from "./unanswered";

type CommandNoticeProps = {
  command: { problem: ProblemDocument | null; unreachable: boolean };
  /** Fields that the form shows; a refusal of one of them stands there and is not said twice. */
  shownFields?: readonly string[];
};

/** Why a write did not go through, where no field of the form says it. */
export function CommandNotice({ command, shownFields = [] }: CommandNoticeProps) {
  const { problem, unreachable } = command;
  if (unreachable) {
    return (
      <Notice tone="warn" live="alert" title="No answer">
        {UNANSWERED_SENTENCE}
      </Notice>
    );
  }
  if (!problem) return null;
  const elsewhere = problem.errors?.length
    ? problem.errors.every((error) => shownFields.includes(error.path.join(".")))
    : false;
  if (elsewhere) return null;
  return (
    <Notice tone="bad" live="alert" title="Not saved">
      {problem.detail}
    </Notice>
  );
}
