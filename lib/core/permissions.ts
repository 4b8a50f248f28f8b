/** Who may do what. One table; commands and queries ask it first, the walk test reads it too. */

export const ROLES = ["donor", "volunteer", "lead", "coordinator"] as const;
export type Role = (typeof ROLES)[number];

const SHED: readonly Role[] = ["volunteer", "lead", "coordinator"];
const LEADING: readonly Role[] = ["lead", "coordinator"];
const COORDINATOR: readonly Role[] = ["coordinator"];

export const PERMISSIONS = {
  "account.own": ROLES,
  "points.read": SHED,
  "points.manage": COORDINATOR,
  "bags.read": SHED,
  "bags.tag": SHED,
  "tags.order": COORDINATOR,
  "photos.read": SHED,
  "photos.add": SHED,
  "photos.remove": LEADING,
  "scales.read": SHED,
  "scales.check": SHED,
  "scales.clear": LEADING,
  "scales.manage": COORDINATOR,
  "palette.manage": COORDINATOR,
  "weighing.record": SHED,
  "weighing.review": LEADING,
  "sorting.record": SHED,
  "sorting.correct": LEADING,
  "stock.read": SHED,
  "stock.edit": SHED,
  "stock.count": SHED,
  "stock.identify": SHED,
  "stock.move": LEADING,
  "stock.review": LEADING,
  "stock.opening": COORDINATOR,
  "steps.record": LEADING,
  "removals.read": SHED,
  "removals.record": LEADING,
  "removals.manage": COORDINATOR,
  "production.read": SHED,
  "production.catalogue": LEADING,
  "production.plan": LEADING,
  "reports.read": LEADING,
  "reports.export": COORDINATOR,
  "ledger.verify": COORDINATOR,
  "people.manage": COORDINATOR,
  "audit.read": COORDINATOR,
  "settings.manage": COORDINATOR,
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof PERMISSIONS;

export function mayRole(role: Role | null, permission: Permission): boolean {
  const allowed: readonly Role[] = PERMISSIONS[permission];
  return role !== null && allowed.includes(role);
}
