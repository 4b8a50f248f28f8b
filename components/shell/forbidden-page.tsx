import { ButtonLink } from "@/components/ui/button-link";
import { DeadEnd } from "./dead-end";

/** A place that the role may not enter (403). */
export function ForbiddenPage({ inFrame }: { inFrame?: boolean }) {
  return (
    <DeadEnd
      title="Your role does not include this page"
      seed={403}
      inFrame={inFrame}
      actions={<ButtonLink href="/account">Go to your account</ButtonLink>}
    >
      <p>
        You are signed in, and nothing was changed. If you need this page for your work, ask a
        coordinator to change your role; it takes effect at once.
      </p>
    </DeadEnd>
  );
}
