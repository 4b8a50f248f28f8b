/** The queue: what it shows of a bag, how it is narrowed, and that thousands of bags cost no more than a page. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type SortingId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { saveDraft } from "@/lib/sorting/commands/drafts";
import { waitingBagsEndpoint, type WaitingFilter } from "@/lib/sorting/contract/waiting";
import { getBagToSort } from "@/lib/sorting/queries/bag-to-sort";
import { listWaitingBags, waitingSql } from "@/lib/sorting/queries/waiting";
import { suggestAlone } from "@/lib/sorting/rules/drafts";
import { newShed, type Shed, type WeighedIn } from "../../support/shed";
import { NOON } from "../../support/scheme";

let shed: Shed;
beforeEach(() => {
  shed = newShed();
});
afterEach(() => {
  shed.close();
});

const run = (sql: string, ...values: unknown[]) =>
  shed.db.writer.client.prepare(sql).run(...values);
const say = (bag: WeighedIn, fields: { polymer?: string; colour?: string; condition?: string }) => {
  for (const [column, value] of [
    ["polymer", fields.polymer],
    ["colour_code", fields.colour],
    ["condition", fields.condition],
  ]) {
    if (value) run(`update weigh_ins set ${column ?? ""} = ? where bag_id = ?`, value, bag.bagId);
  }
};
const list = (filter: WaitingFilter & { after?: string } = {}) =>
  listWaitingBags(shed.ctx("volunteer"), waitingBagsEndpoint.input.parse(filter));
const codes = (filter: WaitingFilter = {}) => list(filter).bags.map(({ code }) => code);

describe("a bag that waits", () => {
  it("shows what was guessed, its first photo, whether it is to be sorted alone, and on whose table it is", () => {
    const bag = shed.weigh(2160);
    say(bag, { polymer: "PP", colour: "blue", condition: "dirty" });
    expect(list().bags).toMatchObject([
      {
        code: bag.code,
        pointName: "Town library",
        netGrams: 2160,
        polymer: "PP",
        condition: "dirty",
        colour: { name: "Blue", look: "solid" },
        photoId: null,
        alone: suggestAlone(bag.code),
        draft: null,
      },
    ]);
    const [id] = shed.db.reader.client
      .prepare("select id from weigh_ins where bag_id = ?")
      .pluck()
      .all(bag.bagId) as string[];
    const photo = (removedAt: number | null, addedAt: number) => {
      const photoId = newId<"photo">(addedAt);
      run(
        `insert into photos (id, subject_kind, subject_id, purpose, visibility, owner_id, added_at, original_key,
           large_key, thumb_key, width, height, bytes, removed_at)
         values (@photoId, 'weigh-in', @id, 'view', 'shed', @owner, @addedAt, @photoId, @photoId || 'l', @photoId || 't',
           10, 10, 100, @removedAt)`,
        { photoId, id, owner: shed.people.volunteer, addedAt, removedAt },
      );
      return photoId;
    };
    photo(NOON + 1, NOON);
    const first = photo(null, NOON + 2);
    photo(null, NOON + 3);
    expect(list().bags[0]?.photoId).toBe(first);

    const draft = newId(NOON) as SortingId;
    saveDraft(shed.ctx("lead"), { id: draft, version: 0, codes: [bag.code], content: "{}" });
    const who = list().bags[0]?.draft;
    expect(who).toEqual({ id: draft, who: expect.any(String) as string });
    expect(getBagToSort(shed.ctx("volunteer"), { code: bag.code }).draft).toEqual(who);
    saveDraft(shed.ctx("lead"), { id: draft, version: 1, codes: [], content: "{}" });
    expect(list().bags[0]?.draft).toBeNull();
  });

  it("is found by point, words of its name, likely polymer and condition, and all of them together", () => {
    const library = shed.weigh(1000, { point: 0 });
    const cafe = shed.weigh(1100, { point: 1 });
    const school = shed.weigh(1200, { point: 2 });
    say(cafe, { polymer: "PP", condition: "wet" });
    say(school, { polymer: "PP" });
    expect(codes()).toHaveLength(3);
    expect(codes({ pointId: shed.points[0] })).toEqual([library.code]);
    expect(codes({ point: "quay" })).toEqual([cafe.code]);
    expect(codes({ point: "s" }).sort()).toEqual([school.code]);
    // A sign that LIKE would take for any letters is a sign here.
    expect(codes({ point: "%" })).toEqual([]);
    expect(codes({ polymer: "PP" }).sort()).toEqual([cafe.code, school.code].sort());
    expect(codes({ polymer: "PP", condition: "wet" })).toEqual([cafe.code]);
    expect(codes({ polymer: "PP", condition: "wet", point: "library" })).toEqual([]);
    // What waits in all is said whatever is shown.
    expect(list({ polymer: "PP" }).waiting).toEqual({ bags: 3, grams: 3300 });
  });

  it("is refused to donors", () => {
    expect(() => listWaitingBags(shed.ctx("donor"), {})).toThrow("forbidden");
  });
});

describe("thousands that wait", () => {
  it("come in pages without a gap, also when they are narrowed", () => {
    const all = Array.from({ length: 120 }, (_, at) =>
      shed.weigh(1000 + at, { point: at % 2, at: instant(NOON + (at >> 1)) }),
    );
    for (const filter of [{}, { pointId: shed.points[1] }]) {
      const seen: string[] = [];
      let after: string | undefined;
      do {
        const page = list({ ...filter, after });
        expect(page.bags.length).toBeLessThanOrEqual(50);
        seen.push(...page.bags.map(({ code }) => code));
        after = page.next ?? undefined;
      } while (after);
      expect(new Set(seen).size).toBe(seen.length);
      expect(seen).toHaveLength("pointId" in filter ? 60 : all.length);
    }
  });

  it("are read by the index of states, whatever they are narrowed to", () => {
    const filters = ["pointId", "polymer", "condition", "point"] as const;
    for (const used of [[], ...filters.map((one) => [one]), filters]) {
      const values = { since: 0, id: "", pointId: "", polymer: "", condition: "", point: "" };
      const plan = (
        shed.db.reader.client.prepare(`explain query plan ${waitingSql(used)}`).all(values) as {
          detail: string;
        }[]
      )
        .map(({ detail }) => detail)
        .join("\n");
      expect(plan).toContain("bags_state_since (state=? AND state_since>?)");
      expect(plan).toContain("photos_subject (subject_kind=? AND subject_id=?)");
      expect(plan).toContain("sorting_draft_bags_one_live (bag_id=?)");
      expect(plan).not.toMatch(/SCAN/);
    }
  });
});
