import { Button } from "@/components/ui/button";
import { ButtonAnchor } from "@/components/ui/button-anchor";
import { DeadEnd } from "./dead-end";

export type FailureProps = {
  /** The number under which the program's log has the cause; absent when it failed in the browser. */
  digest?: string;
  onRetry: () => void;
  inFrame?: boolean;
};

/** A page failed. The cause is in the log, never on the screen; the number leads to it. */
export function Failure({ digest, onRetry, inFrame }: FailureProps) {
  return (
    <DeadEnd
      title="This page failed"
      seed={500}
      inFrame={inFrame}
      actions={
        <>
          <Button onClick={onRetry}>Try again</Button>
          <ButtonAnchor href="/" variant="quiet">
            Go to the front page
          </ButtonAnchor>
        </>
      }
      reference={
        <div>
          <div className="text-xs font-bold text-soft">Request number</div>
          <div className="font-mono text-lg font-bold break-all">
            {digest ?? "none: it failed on this device"}
          </div>
        </div>
      }
    >
      <p>
        What was saved before is safe, and showing this page changes nothing. Try again; if it fails
        again, send the number below to whoever runs the program.
      </p>
    </DeadEnd>
  );
}
