/** Writes of containers and sacks. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { makeLabelIn } from "@/lib/bags/commands/labels";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { requireFreeName, tidyName } from "@/lib/core/names";
import type { Instant } from "@/lib/core/time";
import { actorId, allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  addContainerSchema,
  changeContainerSchema,
  ContainerReceipt,
  reweighContainerEndpoint,
  retireContainerSchema,
} from "../contract/containers";
import { requireScale } from "../queries/instruments";
import { getContainer, type Container } from "../queries/scales";
import { refuseReading, type Reading } from "../rules/reading";

type ContainerId = Id<"container">;

/**
 * Adds a container, with a label of its own, or a sack, without.
 *
 * @throws AppError `name-in-use`
 */
export function addContainer(
  ctx: Context,
  input: z.output<typeof addContainerSchema>,
): ContainerReceipt {
  allow(ctx, "scales.manage");
  return once(ctx, "POST /api/containers", input.requestId, (tx) => {
    const id = input.requestId as ContainerId;
    const { kind, tareMilligrams } = input;
    const name = tidyName(input.name);
    requireFreeName(namesOf(tx), name, null);
    const labelCode = kind === "container" ? makeLabelIn(tx, "container", id, ctx.now) : null;
    prepared(
      tx.client,
      `insert into containers (id, kind, name, tare_mg, label_code, created_at, retired_at)
       values (?, ?, ?, ?, ?, ?, null)`,
    ).run(id, kind, name, tareMilligrams, labelCode, ctx.now);
    keepTare(tx, ctx, id, tareMilligrams);
    recordAudit(tx, ctx, {
      action: "containers.add",
      subjectKind: "container",
      subjectId: id,
      fields: { kind, tareMilligrams },
      personal: { name },
    });
    return { id, kind, name, tareMilligrams, labelCode, retiredAt: null };
  });
}

/**
 * Changes name or empty weight. Weigh-ins already saved keep the tare that they were saved with, and a ticket
 * that still waits is read with the tare of its own time.
 *
 * @throws AppError `not-found`, `name-in-use`
 */
export function changeContainer(
  ctx: Context,
  input: z.output<typeof changeContainerSchema>,
): ContainerReceipt {
  allow(ctx, "scales.manage");
  return once(ctx, `PATCH /api/containers/${input.containerId}`, input.requestId, (tx) => {
    const before = requireContainer(tx, input.containerId);
    const { tareMilligrams } = input;
    const name = tidyName(input.name);
    requireFreeName(namesOf(tx), name, before.id);
    prepared(tx.client, "update containers set name = ?, tare_mg = ? where id = ?").run(
      name,
      tareMilligrams,
      before.id,
    );
    if (tareMilligrams !== before.tareMilligrams) keepTare(tx, ctx, before.id, tareMilligrams);
    recordAudit(tx, ctx, {
      action: "containers.change",
      subjectKind: "container",
      subjectId: before.id,
      fields: { tareMilligrams, tareBefore: before.tareMilligrams },
      personal: { name, nameBefore: before.name },
    });
    return { ...before, name, tareMilligrams };
  });
}

/**
 * Weighs a container or sack again, empty. What was saved keeps its tare, and a ticket that still waits is read
 * with the tare of its own time.
 *
 * @throws AppError `not-found`, `unknown-scale`, `above-max`, `not-a-step`
 */
export function reweighContainer(
  ctx: Context,
  input: z.output<typeof reweighContainerEndpoint.input>,
): ContainerReceipt {
  allow(ctx, "scales.manage");
  return once(ctx, `POST /api/containers/${input.containerId}/tares`, input.requestId, (tx) => {
    const before = requireContainer(tx, input.containerId);
    const scale = requireScale(tx, input.scaleId, ctx.now);
    const tareMilligrams = input.readingMilligrams;
    const refusal = refuseReading(scale, onPan(tareMilligrams), 0);
    if (refusal) throw new AppError(refusal.code, refusal.detail, ["readingMilligrams"]);
    prepared(tx.client, "update containers set tare_mg = ? where id = ?").run(
      tareMilligrams,
      before.id,
    );
    keepTare(tx, ctx, before.id, tareMilligrams);
    recordAudit(tx, ctx, {
      action: "containers.reweigh",
      subjectKind: "container",
      subjectId: before.id,
      fields: { tareMilligrams, tareBefore: before.tareMilligrams, scaleId: scale.id },
    });
    return { ...before, tareMilligrams };
  });
}

/** A load that stands on the scale by itself. */
const onPan = (grossMilligrams: number): Reading => ({
  grossMilligrams,
  containerId: null,
  containerTareMilligrams: 0,
  sackId: null,
  sackTareMilligrams: 0,
});

/**
 * Takes a container or sack out of the lists. Retiring a retired one changes nothing.
 *
 * @throws AppError `not-found`
 */
export function retireContainer(
  ctx: Context,
  input: z.output<typeof retireContainerSchema>,
): ContainerReceipt {
  allow(ctx, "scales.manage");
  return once(ctx, `POST /api/containers/${input.containerId}/retire`, input.requestId, (tx) =>
    setRetiredIn(tx, ctx, input.containerId, ctx.now, "containers.retire"),
  );
}

/**
 * Brings a retired container or sack back into the lists.
 *
 * @throws AppError `not-found`
 */
export function restoreContainer(
  ctx: Context,
  input: z.output<typeof retireContainerSchema>,
): ContainerReceipt {
  allow(ctx, "scales.manage");
  return once(ctx, `POST /api/containers/${input.containerId}/restore`, input.requestId, (tx) =>
    setRetiredIn(tx, ctx, input.containerId, null, "containers.restore"),
  );
}

function setRetiredIn(
  tx: Tx,
  ctx: Context,
  containerId: ContainerId,
  retiredAt: Instant | null,
  action: "containers.retire" | "containers.restore",
): ContainerReceipt {
  const container = requireContainer(tx, containerId);
  if ((container.retiredAt === null) === (retiredAt === null)) return container;
  prepared(tx.client, "update containers set retired_at = ? where id = ?").run(
    retiredAt,
    containerId,
  );
  recordAudit(tx, ctx, { action, subjectKind: "container", subjectId: containerId, fields: {} });
  return { ...container, retiredAt };
}

/** Twice in one millisecond: the later word counts. */
function keepTare(tx: Tx, ctx: Context, containerId: ContainerId, tareMilligrams: number): void {
  prepared(
    tx.client,
    `insert into container_tares (container_id, valid_from, tare_mg, set_by) values (?, ?, ?, ?)
     on conflict do update set tare_mg = excluded.tare_mg, set_by = excluded.set_by`,
  ).run(containerId, ctx.now, tareMilligrams, actorId(ctx) || null);
}

function requireContainer(tx: Tx, containerId: ContainerId): Container {
  const container = getContainer(tx, containerId);
  if (!container) throw new AppError("not-found");
  return container;
}

const namesOf = (tx: Tx): { id: string; name: string }[] =>
  prepared(tx.client, "select id, name from containers").all() as { id: string; name: string }[];
