/**
 * Who may come where: one row for every page and every handler. It is written by hand and not read from
 * the program, so that a permission changed by mistake shows. tests/integration/http walks the handlers
 * and finds rows that are missing; tests/e2e walks the pages of the built program.
 */
import type { Role } from "@/lib/core/permissions";

export const CALLERS = ["nobody", "donor", "volunteer", "lead", "coordinator", "removed"] as const;
/** "removed" was a coordinator, and holds a cookie whose session looked alive a moment ago. */
export type Caller = (typeof CALLERS)[number];

export type Access = "anybody" | "signed-in" | "shed" | "leading" | "coordinator";

const ROLES_OF: Record<Access, readonly Role[]> = {
  anybody: ["donor", "volunteer", "lead", "coordinator"],
  "signed-in": ["donor", "volunteer", "lead", "coordinator"],
  shed: ["volunteer", "lead", "coordinator"],
  leading: ["lead", "coordinator"],
  coordinator: ["coordinator"],
};

/** A removed person is nobody. */
export function mayEnter(access: Access, caller: Caller): boolean {
  if (caller === "nobody" || caller === "removed") return access === "anybody";
  return ROLES_OF[access].includes(caller);
}

/** Pages by their address; parameters in brackets, as the folders of app/ have them. */
export const PAGES: Readonly<Record<string, Access>> = {
  "/": "anybody",
  "/b/[code]": "anybody",
  "/dev/mail": "anybody",
  "/forgotten": "anybody",
  "/points": "anybody",
  "/set-password/[token]": "anybody",
  "/sign-in": "anybody",
  "/account": "signed-in",
  "/bags/[code]": "shed",
  "/removals": "shed",
  "/removals/[id]": "shed",
  "/scales": "shed",
  "/scales/[scaleId]": "shed",
  "/sorting": "shed",
  "/sorting/[code]": "shed",
  "/sorting/sessions/[id]": "shed",
  "/sorting/table/[id]": "shed",
  "/stock": "shed",
  "/stock/lots": "shed",
  "/stock/lots/[number]": "shed",
  "/stock/lots/labels": "shed",
  "/stock/not-sure": "shed",
  "/steps": "shed",
  "/steps/[id]": "shed",
  "/today": "shed",
  "/weigh-in": "shed",
  "/weigh-ins/[id]": "shed",
  "/sorting/sessions/[id]/correct": "leading",
  "/weigh-ins/[id]/correct": "leading",
  "/weigh-ins/for-review": "leading",
  "/removals/[id]/correct": "leading",
  "/removals/new": "leading",
  "/counts": "leading",
  "/steps/[id]/correct": "leading",
  "/steps/new": "leading",
  "/reports": "leading",
  "/audit": "coordinator",
  "/settings": "coordinator",
  "/audit/ledger": "coordinator",
  "/counts/opening": "coordinator",
  "/palette": "coordinator",
  "/people": "coordinator",
  "/points/manage": "coordinator",
  "/removals/destinations": "coordinator",
  "/scales/labels": "coordinator",
  "/tags": "coordinator",
  "/tags/[order]/print": "coordinator",
  "/tags/calibration": "coordinator",
};

/** Handlers by method and address. */
export const HANDLERS: Readonly<Record<string, Access>> = {
  "GET /api/health": "anybody",
  "GET /api/openapi.json": "anybody",
  "POST /api/account/forgotten": "anybody",
  "POST /api/account/set-password": "anybody",

  "GET /api/account": "signed-in",
  "POST /api/account/password": "signed-in",
  "POST /api/account/sign-out-everywhere": "signed-in",

  "GET /api/bags/[code]": "shed",
  "POST /api/bags/[code]/replace-tag": "shed",
  "POST /api/bags/spare": "shed",
  "GET /api/colours": "shed",
  "GET /api/containers": "shed",
  "GET /api/lots": "shed",
  "GET /api/lots/[number]/movements": "shed",
  "GET /api/lots/by-label/[code]": "shed",
  "POST /api/lots/[number]/close": "shed",
  "PUT /api/lots/[number]/container": "shed",
  "POST /api/lots/[number]/counts": "shed",
  "POST /api/lots/[number]/identify": "shed",
  "POST /api/counts/[id]/undo": "shed",
  "POST /api/lot-moves/[id]/undo": "shed",
  "GET /api/steps": "shed",
  "PUT /api/lots/[number]/place": "shed",
  "GET /api/photos": "shed",
  "GET /api/photos/[id]": "shed",
  "GET /api/points": "shed",
  "GET /api/reject-reasons": "shed",
  "GET /api/check-weights": "shed",
  "GET /api/destinations": "shed",
  "GET /api/scales": "shed",
  "GET /api/scales/today": "shed",
  "POST /api/scales/[scaleId]/checks": "shed",
  "GET /api/stock": "shed",
  "POST /api/sortings": "shed",
  "GET /api/sortings/bags/[code]": "shed",
  "GET /api/sortings/waiting": "shed",
  "POST /api/sortings/[id]/undo": "shed",
  "POST /api/sortings/[id]/correct": "leading",
  "GET /api/sortings/drafts": "shed",
  "PUT /api/sortings/drafts/[id]": "shed",
  "DELETE /api/sortings/drafts/[id]": "shed",
  "POST /api/sortings/drafts/[id]/open": "shed",
  "POST /api/weigh-ins": "shed",
  "GET /api/weigh-ins/today": "shed",
  "POST /api/weigh-ins/[id]/undo": "shed",
  "POST /api/weigh-ins/[id]/correct": "leading",
  "POST /api/weigh-ins/[id]/accept": "leading",
  "POST /api/weigh-ins/[id]/discard": "leading",
  "GET /api/weigh-ins/for-review": "leading",

  "DELETE /api/photos/[id]": "leading",
  "POST /api/lots/[number]/merge": "leading",
  "POST /api/lots/[number]/split": "leading",
  "GET /api/counts/to-review": "leading",
  "POST /api/counts/[id]/accept": "leading",
  "POST /api/counts/[id]/correct": "leading",
  "POST /api/lot-moves/[id]/correct": "leading",
  "POST /api/steps": "leading",
  "POST /api/steps/[id]/correct": "leading",
  "POST /api/steps/[id]/undo": "leading",
  "GET /api/removals/lots/[number]": "leading",
  "POST /api/removals": "leading",
  "POST /api/removals/[id]/correct": "leading",
  "POST /api/removals/[id]/receipt": "leading",
  "POST /api/removals/[id]/receipt/correct": "leading",
  "POST /api/removals/[id]/receipt/undo": "leading",
  "POST /api/removals/[id]/undo": "leading",
  "POST /api/scales/[scaleId]/clearances": "leading",

  "GET /api/people": "coordinator",
  "POST /api/people": "coordinator",
  "POST /api/people/[personId]/invite": "coordinator",
  "PUT /api/people/[personId]/role": "coordinator",
  "POST /api/people/[personId]/removal": "coordinator",
  "POST /api/colours": "coordinator",
  "PUT /api/colours": "coordinator",
  "PATCH /api/colours/[code]": "coordinator",
  "POST /api/colours/[code]/retire": "coordinator",
  "POST /api/colours/[code]/restore": "coordinator",
  "POST /api/containers": "coordinator",
  "PATCH /api/containers/[containerId]": "coordinator",
  "POST /api/containers/[containerId]/retire": "coordinator",
  "POST /api/containers/[containerId]/restore": "coordinator",
  "POST /api/containers/[containerId]/tares": "coordinator",
  "POST /api/check-weights": "coordinator",
  "POST /api/check-weights/[checkWeightId]/retire": "coordinator",
  "POST /api/check-weights/[checkWeightId]/restore": "coordinator",
  "POST /api/destinations": "coordinator",
  "PUT /api/destinations/[destinationId]": "coordinator",
  "POST /api/destinations/[destinationId]/retire": "coordinator",
  "POST /api/destinations/[destinationId]/restore": "coordinator",
  "GET /api/audit": "coordinator",
  "GET /api/settings/limits": "shed",
  "PUT /api/settings/limits": "coordinator",
  "GET /api/ledger/verifications": "coordinator",
  "POST /api/ledger/verifications": "coordinator",
  "POST /api/points": "coordinator",
  "PATCH /api/points/[pointId]": "coordinator",
  "POST /api/points/[pointId]/close": "coordinator",
  "POST /api/points/[pointId]/reopen": "coordinator",
  "GET /api/reports/balance.csv": "coordinator",
  "GET /api/reports/balance.csv-metadata.json": "coordinator",
  "GET /api/reports/movements.csv": "coordinator",
  "POST /api/scales": "coordinator",
  "PUT /api/scales/[scaleId]": "coordinator",
  "POST /api/scales/[scaleId]/retire": "coordinator",
  "POST /api/scales/[scaleId]/restore": "coordinator",
  "POST /api/stock/openings": "coordinator",
  "POST /api/tag-orders": "coordinator",
};

/** Handlers that are not served by route(), and why; they are in no contract. */
export const EXCEPTIONS: Readonly<Record<string, string>> = {
  "GET /api/auth/[...nextauth]":
    "next-auth's own door; lib/http/auth-route.ts checks origin and size",
  "POST /api/auth/[...nextauth]":
    "next-auth's own door; lib/http/auth-route.ts checks origin and size",
  "GET /api/uploadthing":
    "the storage's protocol: what may be sent, the same for everybody; lib/http/upload-route.ts",
  "POST /api/uploadthing":
    "the storage's protocol; lib/http/upload-route.ts checks origin, session, permission and size, or the storage's signature",
};

/** An address with something in the place of each parameter, which need not exist. */
export function sampleAddress(pattern: string): string {
  return pattern.replace(/\[(?:\.\.\.)?[^\]]+\]/g, "0190b3f4-7c1a-7000-8000-000000000000");
}
