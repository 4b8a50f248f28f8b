import { describe, expect, it } from "vitest";
import { PERMISSIONS, ROLES, mayRole, type Permission, type Role } from "@/lib/core/permissions";

const names = Object.keys(PERMISSIONS) as Permission[];
const may = (role: Role | null) => names.filter((name) => mayRole(role, name));

describe("permissions", () => {
  it("are named area.verb", () => {
    for (const name of names) expect(name).toMatch(/^[a-z]+(-[a-z]+)*\.[a-z]+(-[a-z]+)*$/);
  });

  it("give nobody anything", () => {
    expect(may(null)).toEqual([]);
  });

  it("grow with the role: whoever may do more may do all that comes before", () => {
    for (let step = 1; step < ROLES.length; step += 1) {
      expect(may(ROLES[step] ?? null)).toEqual(
        expect.arrayContaining(may(ROLES[step - 1] ?? null)),
      );
    }
    expect(may("coordinator")).toEqual(names);
  });

  // The table of roles in product.md's words: the shed is closed to donors, leads correct and see
  // reports, coordinators run the scheme.
  it.each([
    ["donor", "weighing.record", false],
    ["donor", "stock.read", false],
    ["donor", "account.own", true],
    ["volunteer", "weighing.record", true],
    ["volunteer", "sorting.record", true],
    ["volunteer", "stock.read", true],
    ["volunteer", "weighing.review", false],
    ["volunteer", "reports.read", false],
    ["volunteer", "people.manage", false],
    ["lead", "weighing.review", true],
    ["lead", "reports.read", true],
    ["lead", "reports.export", false],
    ["lead", "people.manage", false],
    ["lead", "ledger.verify", false],
    ["coordinator", "reports.export", true],
    ["coordinator", "tags.order", true],
    ["coordinator", "people.manage", true],
  ] as const)("%s: %s is %s", (role, permission, expected) => {
    expect(mayRole(role, permission)).toBe(expected);
  });
});
