/**
 * The context of a page. Each starts with `connection()`: the page goes dynamic before anything touches
 * the database, and a policy with a nonce allows no page that was made at build time.
 */
import "server-only";
import type { Route } from "next";
import { headers } from "next/headers";
import { forbidden, redirect } from "next/navigation";
import { connection } from "next/server";
import { cache } from "react";
import { mayRole, type Permission, type Role } from "@/lib/core/permissions";
import type { Context } from "@/lib/platform/context";
import { findScheme } from "@/lib/platform/scheme";
import { PATH_HEADER, REQUEST_ID_HEADER } from "./page-headers";
import { anonymousContext, identify, newRequestId } from "./request-context";

/** Read once for a layout and the page inside it. */
const readContext = cache(async () => {
  const list = await headers();
  const ctx = anonymousContext(list, list.get(REQUEST_ID_HEADER) ?? newRequestId());
  const ended = await identify(ctx, list);
  return { ctx, ended, path: list.get(PATH_HEADER) ?? "/" };
});

/**
 * For a page of one permission. Nobody is sent to sign in and comes back here; a role without the
 * permission gets the page that says so (403).
 */
export async function pageContext(permission: Permission): Promise<Context> {
  await connection();
  const { ctx, ended, path } = await readContext();
  if (ctx.actor.kind !== "person") {
    const query = new URLSearchParams({ next: path });
    if (ended) query.set("ended", "1");
    redirect(`/sign-in?${query.toString()}` as Route);
  }
  if (!mayRole(ctx.actor.role, permission)) forbidden();
  return ctx;
}

/** For a page that anybody may open, signed in or not. */
export async function publicContext(): Promise<Context> {
  await connection();
  return (await readContext()).ctx;
}

/** What the frame around every page needs: the role decides its navigation; null for nobody. */
export async function shellContext(): Promise<{ role: Role | null; schemeName: string }> {
  await connection();
  const { ctx } = await readContext();
  return {
    role: ctx.actor.kind === "person" ? ctx.actor.role : null,
    schemeName: findScheme(ctx.db.reader)?.name ?? "Bismar",
  };
}
