import { ButtonLink } from "@/components/ui/button-link";
import { DeadEnd } from "./dead-end";

/** Nothing under this address, or nothing that this person may know of: both read the same. */
export function NotFoundPage({ inFrame }: { inFrame?: boolean }) {
  return (
    <DeadEnd
      title="There is nothing under this address"
      seed={404}
      inFrame={inFrame}
      actions={<ButtonLink href="/">Go to the front page</ButtonLink>}
    >
      <p>
        The address may be mistyped, or what it named is not yours to see. If you typed a bag&apos;s
        code, check it against the tag: it has eight letters and figures, such as K7Q2-9F4M.
      </p>
    </DeadEnd>
  );
}
