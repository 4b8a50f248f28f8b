import type { Metadata } from "next";
import { ChangePasswordForm } from "@/components/identity/change-password-form";
import { SignOutEverywhere } from "@/components/identity/sign-out-everywhere";
import { SignOutButton } from "@/components/shell/sign-out-button";
import { PageHeader } from "@/components/ui/page-header";
import { Ticket } from "@/components/ui/ticket";
import { pageContext } from "@/lib/http/page-context";
import { getAccount } from "@/lib/identity/queries";
import { ROLE_NAMES } from "@/lib/identity/terms";

export const metadata: Metadata = { title: "Account" };

export default async function AccountPage() {
  const ctx = await pageContext("account.own");
  const account = getAccount(ctx);
  return (
    <>
      <PageHeader title="Account" titleInBar />
      <div className="grid gap-5 wide:grid-cols-2 wide:items-start">
        <Ticket
          as="section"
          label="Who you are"
          stub={
            <>
              <h2 className="text-xl break-words">{account.name}</h2>
              <p className="break-words text-soft">{account.email}</p>
              <p className="mt-1">{ROLE_NAMES[account.role]}</p>
            </>
          }
        >
          <div className="flex flex-col gap-3">
            <SignOutButton />
            <h3 className="mt-2 text-base">Lost a phone?</h3>
            <p className="text-soft">
              This ends every session of yours at once, also the one here. What waits on a phone to
              be sent stays there until you sign in on it again.
            </p>
            <SignOutEverywhere />
          </div>
        </Ticket>
        <Ticket as="section" label="Password">
          <h2 className="mb-4 text-xl">Change password</h2>
          <ChangePasswordForm email={account.email} />
        </Ticket>
      </div>
    </>
  );
}
