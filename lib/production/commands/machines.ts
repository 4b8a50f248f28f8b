/** Writes of the catalogue's machines and of densities. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { requireFreeName, tidyName } from "@/lib/core/names";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  addMachineEndpoint,
  changeMachineEndpoint,
  Density,
  Machine,
  MachineData,
  setDensityEndpoint,
} from "../contract/catalogue";
import { getMachine, readDensities, readMachines } from "../queries/catalogue";

type MachineId = Id<"machine">;

/** @throws AppError `name-in-use` */
export function addMachine(
  ctx: Context,
  input: z.output<typeof addMachineEndpoint.input>,
): Machine {
  allow(ctx, "production.catalogue");
  return once<Machine>(ctx, "POST /api/machines", input.requestId, (tx) => {
    const id = input.requestId as MachineId;
    requireFreeName(readMachines(tx), input.name, null);
    prepared(
      tx.client,
      `insert into machines (id, name, method, plate_length_um, plate_width_um, barrel_mm3, usable_thousandths,
         least_shot_mg, purge_mg, melt_s, cycle_s, rated_watts, created_at)
       values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    ).run(id, ...columnsOf(input), ctx.now);
    insertSetPoints(tx, id, input);
    recordMachineAudit(tx, ctx, "machines.add", id, input);
    return requireMachine(tx, id);
  });
}

/** @throws AppError `not-found`, `name-in-use` */
export function changeMachine(
  ctx: Context,
  input: z.output<typeof changeMachineEndpoint.input>,
): Machine {
  allow(ctx, "production.catalogue");
  return once<Machine>(ctx, `PUT /api/machines/${input.machineId}`, input.requestId, (tx) => {
    const { id } = requireMachine(tx, input.machineId);
    requireFreeName(readMachines(tx), input.name, id);
    prepared(
      tx.client,
      `update machines set name = ?, method = ?, plate_length_um = ?, plate_width_um = ?, barrel_mm3 = ?,
         usable_thousandths = ?, least_shot_mg = ?, purge_mg = ?, melt_s = ?, cycle_s = ?, rated_watts = ? where id = ?`,
    ).run(...columnsOf(input), id);
    prepared(tx.client, "delete from set_points where machine_id = ?").run(id);
    insertSetPoints(tx, id, input);
    recordMachineAudit(tx, ctx, "machines.change", id, input);
    return requireMachine(tx, id);
  });
}

/** The scheme's own density with its source; without one the reference's counts again. */
export function setDensity(
  ctx: Context,
  input: z.output<typeof setDensityEndpoint.input>,
): Density {
  allow(ctx, "production.catalogue");
  const { polymer, mgPerCm3, source } = input;
  return once<Density>(ctx, `PUT /api/densities/${polymer}`, input.requestId, (tx) => {
    if (mgPerCm3 === null) {
      prepared(tx.client, "delete from densities where polymer = ?").run(polymer);
    } else {
      prepared(
        tx.client,
        `insert into densities (polymer, mg_per_cm3, source, changed_at) values (?, ?, ?, ?)
           on conflict (polymer) do update set mg_per_cm3 = excluded.mg_per_cm3, source = excluded.source,
             changed_at = excluded.changed_at`,
      ).run(polymer, mgPerCm3, source, ctx.now);
    }
    recordAudit(tx, ctx, {
      action: "machines.density",
      subjectKind: "density",
      subjectId: polymer,
      fields: { mgPerCm3, source },
    });
    const density = readDensities(tx).find((one) => one.polymer === polymer);
    if (!density) throw new AppError("not-found");
    return density;
  });
}

/** A field that the method has no use for is not kept. */
function columnsOf(data: MachineData) {
  const press = data.method === "pressing";
  const moulds = data.method === "moulding";
  return [
    tidyName(data.name),
    data.method,
    press ? data.plateLengthUm : null,
    press ? data.plateWidthUm : null,
    moulds ? data.barrelMm3 : null,
    moulds ? data.usableThousandths : null,
    moulds ? (data.leastShotMilligrams ?? 0) : null,
    moulds ? (data.purgeMilligrams ?? 0) : null,
    data.meltSeconds,
    data.cycleSeconds,
    data.ratedWatts,
  ] as const;
}

function insertSetPoints(tx: Tx, id: MachineId, { setPoints }: MachineData): void {
  const insert = prepared(
    tx.client,
    `insert into set_points (machine_id, polymer, celsius) values (?, ?, ?)
       on conflict (machine_id, polymer) do update set celsius = excluded.celsius`,
  );
  for (const { polymer, celsius } of setPoints) insert.run(id, polymer, celsius);
}

function recordMachineAudit(
  tx: Tx,
  ctx: Context,
  action: "machines.add" | "machines.change",
  id: MachineId,
  data: MachineData,
): void {
  const setPoints = data.setPoints.map(({ polymer, celsius }) => `${polymer} ${celsius} °C`);
  recordAudit(tx, ctx, {
    action,
    subjectKind: "machine",
    subjectId: id,
    fields: { name: data.name, method: data.method, setPoints: setPoints.join(", ") },
  });
}

function requireMachine(tx: Tx, id: MachineId): Machine {
  const machine = getMachine(tx, id);
  if (!machine) throw new AppError("not-found");
  return machine;
}
