import type { Metadata, Route } from "next";
import { redirect } from "next/navigation";
import { AccountCard } from "@/components/identity/account-card";
import { SignInForm } from "@/components/identity/sign-in-form";
import { publicContext } from "@/lib/http/page-context";
import { homeOf, safeNext } from "@/lib/identity/rules/people";

export const metadata: Metadata = { title: "Sign in" };

type SignInProps = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** Whoever is signed in already is led on: to the page they came for, or to where their role begins. */
export default async function SignInPage({ searchParams }: SignInProps) {
  const ctx = await publicContext();
  const { next, ended } = await searchParams;
  const wish = safeNext(typeof next === "string" ? next : null);
  if (ctx.actor.kind === "person") redirect((wish ?? homeOf(ctx.actor.role)) as Route);
  return (
    <AccountCard title="Sign in">
      <SignInForm next={wish ?? "/sign-in"} ended={ended === "1"} />
    </AccountCard>
  );
}
