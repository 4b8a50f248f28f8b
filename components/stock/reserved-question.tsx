import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { ProblemDocument } from "@/lib/core/errors";

type Props = {
  command: { problem: ProblemDocument | null; pending: boolean };
  /** Sends it again, knowing that a run counted on it. */
  onTake: () => void;
};

/** Asked once, before grams are taken that are reserved for a run. */
export function ReservedQuestion({ command: { problem, pending }, onTake }: Props) {
  if (problem?.code !== "lot-reserved") return null;
  return (
    <Notice
      tone="warn"
      title="Reserved for a run"
      live="alert"
      action={
        <Button variant="quiet" busy={pending} onClick={onTake}>
          Take it all the same
        </Button>
      }
    >
      {problem.detail}
    </Notice>
  );
}
