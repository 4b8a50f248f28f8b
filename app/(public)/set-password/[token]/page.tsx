import type { Metadata } from "next";
import { AccountCard } from "@/components/identity/account-card";
import { SetPasswordForm } from "@/components/identity/set-password-form";
import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import { sentence } from "@/lib/core/messages";
import { publicContext } from "@/lib/http/page-context";
import { findLink } from "@/lib/identity/queries";

export const metadata: Metadata = { title: "Set a password", referrer: "no-referrer" };

type SetPasswordProps = { params: Promise<{ token: string }> };

/** Where a mailed link leads. Opening it changes nothing, because mail scanners open links too. */
export default async function SetPasswordPage({ params }: SetPasswordProps) {
  const ctx = await publicContext();
  const { token } = await params;
  const link = findLink(ctx.db.reader, token, ctx.now);
  if (!link) {
    return (
      <AccountCard title="This link does not work any more">
        <Notice tone="warn" action={<ButtonLink href="/forgotten">Ask for a new link</ButtonLink>}>
          {sentence("link-expired")}
        </Notice>
      </AccountCard>
    );
  }
  return (
    <AccountCard title={link.purpose === "invite" ? `Welcome, ${link.name}` : "Set a new password"}>
      <p className="mb-4 break-words text-soft">You sign in with {link.email}.</p>
      <SetPasswordForm token={token} email={link.email} />
    </AccountCard>
  );
}
