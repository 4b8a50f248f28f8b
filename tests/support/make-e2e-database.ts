/**
 * Makes a database for browser tests, in a process of its own (the commands need the server's conditions):
 * `node --conditions=react-server --import tsx tests/support/make-e2e-database.ts FILE shed|demo|empty`.
 *
 * "shed" is a small scheme that holds nothing yet but what a first day needs; "demo" is the demo; "empty" is
 * migrated and not set up.
 */
import { randomUUID } from "node:crypto";
import { openDb, type Db } from "@/db/client";
import { migrateDatabase } from "@/db/migrate";
import { seedDemo } from "@/db/seed/demo";
import { orderTags } from "@/lib/bags/commands/order-tags";
import { setUpSchemeIn } from "@/lib/cli/set-up-scheme";
import { newId, type PersonId } from "@/lib/core/ids";
import { ROLES } from "@/lib/core/permissions";
import { addDays, dayOf } from "@/lib/core/time";
import { addPersonIn } from "@/lib/identity/commands/add-people";
import { hashPassword } from "@/lib/identity/commands/scrypt";
import { now } from "@/lib/platform/clock";
import type { Context } from "@/lib/platform/context";
import { inTransaction } from "@/lib/platform/database";
import { addPoint } from "@/lib/points/commands";
import { addContainer } from "@/lib/scales/commands/containers";
import { addScale } from "@/lib/scales/commands/scales";
import signIns from "@/db/seed/sign-ins.json";

const ZONE = "UTC";

async function fillShed(db: Db): Promise<void> {
  const at = now();
  const context = (actor: Context["actor"]): Context => ({
    actor,
    now: at,
    requestId: randomUUID(),
    bodyHash: "",
    address: null,
    db,
  });
  const system = context({ kind: "system" });
  const passwordHash = await hashPassword(signIns[0]?.password ?? "");
  const coordinatorId = inTransaction(system, (tx) => {
    setUpSchemeIn(tx, system, {
      name: "Saltmarsh Plastics Shed",
      timeZone: ZONE,
      firstDay: addDays(dayOf(at, ZONE), -30),
    });
    const ids = ROLES.map((role) =>
      addPersonIn(tx, system, {
        name: `Test ${role}`,
        email: `${role}@saltmarsh.example`,
        role,
        passwordHash,
      }),
    );
    return ids[ROLES.indexOf("coordinator")] as PersonId;
  });
  const coordinator = context({
    kind: "person",
    id: coordinatorId,
    role: "coordinator",
    sessionId: null,
  });
  const requestId = () => newId<"request">(at);
  const point = addPoint(coordinator, {
    requestId: requestId(),
    name: "Harbour Road Library",
    kind: "library",
  });
  orderTags(coordinator, { requestId: requestId(), count: 24, pointId: point.id });
  addScale(coordinator, {
    requestId: requestId(),
    name: "Bench scale",
    class: "III",
    maxMilligrams: 30_000_000,
    dMilligrams: 5_000,
    eMilligrams: 5_000,
  });
  addContainer(coordinator, {
    requestId: requestId(),
    name: "Blue crate",
    kind: "container",
    tareMilligrams: 1_200_000,
  });
}

const [file, what] = process.argv.slice(2);
if (!file || !what) throw new Error("Give a file and what it should hold.");
migrateDatabase(file);
const db = openDb(file);
if (what === "shed") await fillShed(db);
else if (what === "demo") {
  await seedDemo(db, now(), (ctx, scheme) =>
    inTransaction(ctx, (tx) => {
      setUpSchemeIn(tx, ctx, scheme);
    }),
  );
} else if (what !== "empty") throw new Error(`${what} is no kind of database.`);
// Everything into the one file, so that it can be copied alone.
db.writer.client.pragma("wal_checkpoint(TRUNCATE)");
db.close();
