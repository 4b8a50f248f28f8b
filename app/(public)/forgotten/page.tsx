import type { Metadata } from "next";
import { AccountCard } from "@/components/identity/account-card";
import { ForgottenForm } from "@/components/identity/forgotten-form";
import { publicContext } from "@/lib/http/page-context";

export const metadata: Metadata = { title: "Forgotten password" };

export default async function ForgottenPage() {
  await publicContext();
  return (
    <AccountCard title="Forgotten password">
      <ForgottenForm />
    </AccountCard>
  );
}
