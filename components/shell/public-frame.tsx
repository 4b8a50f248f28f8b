import Link from "next/link";
import type { ReactNode } from "react";
import { BismarMark } from "@/components/ui/bismar-mark";
import { ButtonLink } from "@/components/ui/button-link";
import { SkipLink } from "./skip-link";

type PublicFrameProps = {
  schemeName: string;
  /** Signed in already: the corner leads into the shed instead. */
  signedIn: boolean;
  children: ReactNode;
};

/** The frame of pages that anybody may open. */
export function PublicFrame({ schemeName, signedIn, children }: PublicFrameProps) {
  return (
    <div className="relative isolate flex min-h-dvh flex-col overflow-x-clip">
      <SkipLink />
      <header className="z-10 flex min-h-16 items-center justify-between gap-4 px-4 py-2 wide:min-h-20 wide:px-12 print:hidden">
        <Link href="/" className="flex min-h-11 min-w-0 items-center gap-2.5 rounded-control">
          <BismarMark />
          <span className="font-heading text-lg leading-tight font-bold wide:text-xl">
            {schemeName}
          </span>
        </Link>
        {signedIn ? (
          <ButtonLink
            href="/account"
            variant="quiet"
            size="small"
            className="shrink-0 whitespace-nowrap"
          >
            Your account
          </ButtonLink>
        ) : (
          <ButtonLink
            href="/sign-in"
            variant="quiet"
            size="small"
            className="shrink-0 whitespace-nowrap"
          >
            Sign in
          </ButtonLink>
        )}
      </header>
      <main
        id="content"
        tabIndex={-1}
        className="flex grow flex-col px-4 pb-10 outline-none wide:px-12"
      >
        {children}
      </main>
    </div>
  );
}
