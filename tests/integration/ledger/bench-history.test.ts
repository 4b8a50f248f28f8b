/**
 * Random histories of commands, as people at the bench would send them, against the plain model: whatever is weighed,
 * sorted, stepped, merged, split, counted, taken away, proven, undone and corrected, every balance, composition and
 * total is what an array of movements says, no holder is below zero, every report row closes, the chain is valid.
 *
 * BISMAR_BENCH_ACTS sets how long a history is, BISMAR_BENCH_SEEDS how many there are besides the fixed ones.
 */
import { afterAll, describe, expect, it, vi } from "vitest";
import { seeded } from "@/db/seed/random";
import { AppError } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import type { Draft } from "@/lib/ledger/commands/post";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { addDestination } from "@/lib/removals/commands/destinations";
import { ACTS } from "@/tests/support/bench-history/acts";
import { later, type Bench } from "@/tests/support/bench-history/desk";
import { takeRecorded } from "@/tests/support/bench-history/recorder";
import { expectSame } from "@/tests/support/ledger-history/comparison";
import { expectRowsClose } from "@/tests/support/ledger-history/report-rows";
import type { World } from "@/tests/support/ledger-history/world";
import { emptyBook } from "@/tests/support/plain-model/movements";
import { correctPlain, postPlain, shortHoldings } from "@/tests/support/plain-model/posting";
import { NOON } from "@/tests/support/scheme";
import { newShed, type Shed } from "@/tests/support/shed";

vi.mock("@/lib/ledger/commands/post", async (load) => {
  const { recording } = await import("@/tests/support/bench-history/recorder");
  return recording(await load());
});

const LENGTH = Number(process.env.BISMAR_BENCH_ACTS ?? 140);
const SEEDS = [
  ...[20_261_201, 4, 271_828, 314_159, 847_783_853],
  ...Array.from(
    { length: Number(process.env.BISMAR_BENCH_SEEDS ?? 1) },
    (_, at) => (Date.now() + at * 7919) % 2 ** 31,
  ),
];
const BETWEEN_CHECKS = 20;

const plain = (drafts: readonly Draft[]) =>
  drafts.map(({ kind, occurredAt, lines }) => ({
    kind,
    lines,
    day: new Date(occurredAt).toISOString().slice(0, 10),
  }));

function worldOf(shed: Shed): Pick<World, "scheme" | "book"> {
  const lookUp = (sql: string) => {
    const statement = shed.db.reader.client.prepare(sql).pluck();
    return (id: number) => statement.get(id);
  };
  const rowOf = lookUp("select row_id from materials where id = ?");
  const typeOf = lookUp("select type from origins where no = ?");
  return {
    scheme: shed,
    book: emptyBook({
      rowOf: (material) => rowOf(material) as number,
      typeOf: (origin) => typeOf(origin) as never,
    }),
  };
}

const done = new Map<string, number>();

function live(seed: number): void {
  const random = seeded(seed);
  const shed = newShed();
  const world = worldOf(shed) as World;
  const story: string[] = [];
  try {
    const destination = (name: string, route: "disposed" | "passed-on") =>
      addDestination(shed.ctx("coordinator", NOON), {
        requestId: newId(NOON),
        name,
        route,
        receiverNumber: "",
        carrierName: "",
        carrierNumber: "",
        permitUntil: null,
        wasteCode: "",
      }).id;
    const bench: Bench = {
      shed,
      random,
      now: NOON,
      destinations: {
        disposed: destination("Station", "disposed"),
        passedOn: destination("Recycler", "passed-on"),
      },
    };
    takeRecorded();
    for (let at = 1; at <= LENGTH; at += 1) {
      const [name, act] = random.weighted(ACTS.map((one) => [one, one[2]] as const));
      bench.now = later(bench.now, random);
      try {
        act(bench);
        const recorded = takeRecorded();
        for (const one of recorded) {
          if (one.kind === "post") postPlain(world.book, plain(one.drafts));
          else correctPlain(world.book, one.wrong, plain(one.drafts));
        }
        story.push(`${name}: ${recorded.length}`);
        if (recorded.length > 0) done.set(name, (done.get(name) ?? 0) + 1);
      } catch (error) {
        takeRecorded();
        if (!(error instanceof AppError)) throw error;
        story.push(`${name}: refused, ${error.code}`);
      }
      if (at % BETWEEN_CHECKS === 0 || at === LENGTH) expectSame(world);
    }
    expect(shortHoldings(world.book)).toEqual([]);
    expectRowsClose(world, "2026-01-01", "2027-01-01");
    expect(verifyLedger(shed.db.reader)).toMatchObject({ ok: true, problem: null });
  } catch (error) {
    const message = error instanceof Error ? `${error.message}\n${error.stack}` : String(error);
    throw new Error(`${message}\n${story.slice(-12).join("\n")}`, { cause: error });
  } finally {
    shed.close();
  }
}

describe("random histories of the bench", () => {
  it.each(SEEDS)("agree with the plain model (seed %i)", (seed) => live(seed));

  it.skipIf(LENGTH < 100)("came to everything that they are for", () => {
    expect(ACTS.map(([name]) => name).filter((name) => !done.has(name))).toEqual([]);
  });
});

afterAll(() => {
  if (process.env.BISMAR_BENCH_ACTS) console.log(Object.fromEntries(done));
});
