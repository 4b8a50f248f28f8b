/** A run by the number in its page's address; anything else is no page. */
import "server-only";
import { notFound } from "next/navigation";
import type { Context } from "@/lib/platform/context";
import { getRunPage, type RunPage } from "@/lib/production/queries/runs";

export function findRunPage(ctx: Context, number: string): RunPage {
  if (!/^[1-9]\d{0,8}$/.test(number)) notFound();
  return getRunPage(ctx, Number(number)) ?? notFound();
}
