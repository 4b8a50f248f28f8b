import { describe, expect, test } from "vitest";
import { barFor, isInPlace, placesFor } from "@/components/shell/places";
import { ROLES } from "@/lib/core/permissions";

const ids = (places: readonly { id: string }[]) => places.map((place) => place.id);

describe("who finds what in the navigation", () => {
  test("a donor finds the own account and nothing of the shed", () => {
    expect(ids(placesFor("donor"))).toEqual(["account"]);
  });

  test("a volunteer finds the work, no report and no settings", () => {
    expect(ids(placesFor("volunteer"))).toEqual([
      "today",
      "weigh-in",
      "sorting",
      "stock",
      "runs",
      "catalogue",
      "removals",
      "scales",
      "account",
    ]);
  });

  test("a lead finds reports too", () => {
    expect(ids(placesFor("lead"))).toEqual([
      "today",
      "weigh-in",
      "sorting",
      "stock",
      "runs",
      "catalogue",
      "steps",
      "counts",
      "removals",
      "reports",
      "scales",
      "account",
    ]);
  });

  test("a coordinator finds every place", () => {
    expect(placesFor("coordinator")).toHaveLength(18);
  });

  test.each(ROLES)("the bottom bar of a %s has at most four places and loses none", (role) => {
    const { bar, more } = barFor(role);
    expect(bar.length).toBeLessThanOrEqual(4);
    expect([...ids(bar), ...ids(more)].sort()).toEqual(ids(placesFor(role)).sort());
  });
});

test("a page is in the place whose path it continues, not in one that only begins alike", () => {
  expect(isInPlace("/stock", "/stock")).toBe(true);
  expect(isInPlace("/stock/lots/118", "/stock")).toBe(true);
  expect(isInPlace("/stocktake", "/stock")).toBe(false);
});
