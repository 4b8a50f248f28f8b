/**
 * The demo: eight months of the invented scheme, made through the real commands, as its people would have
 * made it. Seeded, so that it is the same story every time; its last day is the day on which it is made.
 */
import "server-only";
import { createHash, randomUUID } from "node:crypto";
import type { Db } from "@/db/client";
import { orderTags } from "@/lib/bags/commands/order-tags";
import { newId, uuidV7, type PersonId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import { addDays, dayOf, instant, type Day, type Instant } from "@/lib/core/time";
import { addPersonIn } from "@/lib/identity/commands/add-people";
import { hashPassword } from "@/lib/identity/commands/scrypt";
import type { Context } from "@/lib/platform/context";
import { inTransaction } from "@/lib/platform/database";
import { addPoint } from "@/lib/points/commands";
import { addContainer } from "@/lib/scales/commands/containers";
import { addScale } from "@/lib/scales/commands/scales";
import { setLotPlace } from "@/lib/stock/commands/place";
import type { Cast, Shed, Tools } from "./cast";
import { fillShed, type Waiting } from "./days";
import { seeded } from "./random";
import { mend } from "./mending";
import signIns from "./sign-ins.json";
import { equip } from "./workshop";
import { fillCatalogue } from "./workshop-catalogue";
import { planRuns } from "./workshop-plans";
import { MORE_VOLUNTEERS, NAMES, POINTS, SCALES, SCHEME, TARES } from "./story";

const MONTHS_IN_DAYS = 243;
const SEED = 20_260_506;

export type DemoSummary = { bags: number; sorted: number; waiting: number; entries: number };

/**
 * Fills an empty, migrated database.
 *
 * @param setUpScheme what makes the scheme itself (lib/cli), with the demo's name and first day
 * @param now the story's last moment
 */
export async function seedDemo(
  db: Db,
  now: Instant,
  setUpScheme: (ctx: Context, scheme: { name: string; timeZone: string; firstDay: Day }) => void,
): Promise<DemoSummary> {
  const random = seeded(SEED);
  const firstDay = addDays(dayOf(now, SCHEME.timeZone), -MONTHS_IN_DAYS);
  const start = instant(Date.parse(`${firstDay}T07:00:00Z`));
  const passwordHash = await hashPassword(signIns[0]?.password ?? "");
  const context = (actor: Context["actor"], at: Instant): Context => ({
    actor,
    now: at,
    requestId: randomUUID(),
    // A command line has no body; what is done once is told apart by its request id alone.
    bodyHash: createHash("sha256").update("demo").digest("hex"),
    address: null,
    db,
  });
  const system = context({ kind: "system" }, start);
  setUpScheme(system, { ...SCHEME, firstDay });

  const people = inTransaction(system, (tx) => {
    const add = (name: string, email: string, role: Role): PersonId =>
      addPersonIn(tx, system, { name, email, role, passwordHash, id: newId<"person">(start) });
    const byRole = Object.fromEntries(
      signIns.map(({ role, email }) => [role, add(NAMES[role as Role], email, role as Role)]),
    ) as Record<Role, PersonId>;
    return {
      byRole,
      more: MORE_VOLUNTEERS.map(({ name, email }) => add(name, email, "volunteer")),
    };
  });

  const cast: Cast = {
    db,
    random,
    as: (id, role, at) => context({ kind: "person", id, role, sessionId: null }, at),
    requestId: (at) => uuidV7(at, random.bytes(10)),
    volunteers: [people.byRole.volunteer, ...people.more],
    lead: people.byRole.lead,
    coordinator: people.byRole.coordinator,
  };
  const coordinator = cast.as(cast.coordinator, "coordinator", start);
  const sheds = addPoints(cast, coordinator);
  const tools = addTools(cast, coordinator);
  const works = equip(cast, tools, firstDay, start);
  const workshop = fillCatalogue(cast, start);
  const waiting: Waiting[] = fillShed(cast, sheds, tools, works, {
    firstDay,
    now,
    timeZone: SCHEME.timeZone,
  });
  mend(cast, tools, sheds, now);
  placeLots(cast, now);
  planRuns(cast, workshop, now);

  const count = (sql: string): number => db.reader.client.prepare(sql).pluck().get() as number;
  return {
    bags: count("select count(*) from weigh_ins where state = 'posted'"),
    sorted: count("select count(*) from sorting_sessions where state = 'closed'"),
    waiting: waiting.length,
    entries: count("select count(*) from entries"),
  };
}

/** Points with a first order of tags for each; the codes come back in the order in which they are used. */
function addPoints(cast: Cast, ctx: Context): Shed[] {
  const codesOf = cast.db.reader.client
    .prepare("select code from bags where order_id = ? order by code")
    .pluck();
  return POINTS.map((story) => {
    const id = addPoint(ctx, {
      requestId: cast.requestId(ctx.now),
      name: story.name,
      kind: story.kind,
    }).id;
    const count = Math.min(400, Math.ceil(story.bagsPerWeek * (MONTHS_IN_DAYS / 7) * 1.35) + 12);
    const order = orderTags(ctx, { requestId: cast.requestId(ctx.now), count, pointId: id });
    return { story, id, codes: codesOf.all(order.id) as string[] };
  });
}

function addTools(cast: Cast, ctx: Context): Tools {
  const [bench, floor] = SCALES.map(
    (scale) => addScale(ctx, { requestId: cast.requestId(ctx.now), ...scale }).id,
  );
  if (!bench || !floor) throw new RangeError("the story has two scales");
  const tares = Object.fromEntries(
    TARES.map((tare) => {
      const made = addContainer(ctx, { requestId: cast.requestId(ctx.now), ...tare });
      return [tare.name, { id: made.id, milligrams: tare.tareMilligrams }];
    }),
  );
  return { bench, floor, tares };
}

/** Where each lot stands in the shed, as somebody would have written it on. */
function placeLots(cast: Cast, now: Instant): void {
  const lots = cast.db.reader.client
    .prepare(
      `select l.number, r.polymer from lots l join materials m on m.id = l.material_id
       join "rows" r on r.id = m.row_id where l.closed_at is null order by l.number`,
    )
    .all() as { number: number; polymer: string }[];
  const shelves: Record<string, string> = {
    "PE-HD": "A",
    PP: "B",
    "PE-LD": "C",
    PS: "D",
    PET: "E",
  };
  lots.forEach(({ number, polymer }, index) => {
    const ctx = cast.as(cast.lead, "lead", now);
    setLotPlace(ctx, {
      requestId: cast.requestId(now),
      number,
      place: `Shelf ${shelves[polymer] ?? "F"}, crate ${(index % 9) + 1}`,
    });
  });
}
