/** A scheme with what stands at a weighing desk: points, tags, a scale, a crate and a sack. */
import { orderTags } from "@/lib/bags/commands/order-tags";
import { getTagOrderSheet } from "@/lib/bags/queries";
import type { LabelCode } from "@/lib/core/bag-code";
import { newId, type Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { addPoint } from "@/lib/points/commands";
import { addContainer } from "@/lib/scales/commands/containers";
import { addScale } from "@/lib/scales/commands/scales";
import { FIRST_PALETTE } from "@/lib/stock/terms";
import { weighBag } from "@/lib/weighing/commands/weigh-bag";
import { weighInInputSchema, type WeighInReceipt } from "@/lib/weighing/contract/weigh-ins";
import { newScheme, NOON, type TestScheme } from "./scheme";

/** One reading: gross in milligrams, by default in the crate (1.600 kg) and the sack (0.020 kg). */
export type DeskReading = Partial<{
  grossMilligrams: number;
  containerId: string | null;
  containerTareMilligrams: number;
  sackId: string | null;
  sackTareMilligrams: number;
}>;

export function weighingDesk(options: Parameters<typeof newScheme>[0] = {}) {
  const scheme = newScheme(options);
  const ctx = scheme.ctx("coordinator", NOON);
  const write = scheme.db.writer.client;
  for (const [kind, name] of [
    ["shed", "At the shed"],
    ["not-known", "Not known"],
  ]) {
    const known = write.prepare("select 1 from points where kind = ?").get(kind);
    if (!known) {
      write
        .prepare("insert into points (id, name, kind, created_at) values (?, ?, ?, ?)")
        .run(newId(NOON), name, kind, NOON);
    }
  }
  FIRST_PALETTE.forEach(({ code, name, hex, look }, position) =>
    write
      .prepare(
        "insert or ignore into colours (code, name, hex, look, position) values (?, ?, ?, ?, ?)",
      )
      .run(code, name, hex, look, position),
  );
  const point = addPoint(ctx, {
    requestId: newId(NOON),
    name: "Harbour Road Library",
    kind: "library",
  });
  const scale = addScale(ctx, {
    requestId: newId(NOON),
    name: "Bench scale",
    class: "III",
    maxMilligrams: 15_000_000,
    eMilligrams: 5_000,
    dMilligrams: 5_000,
  });
  const crate = addContainer(ctx, {
    requestId: newId(NOON),
    kind: "container",
    name: "Blue crate",
    tareMilligrams: 1_600_000,
  });
  const sack = addContainer(ctx, {
    requestId: newId(NOON),
    kind: "sack",
    name: "Woven sack",
    tareMilligrams: 20_000,
  });
  const tags = (count: number, pointId: Id<"point"> | null = point.id): LabelCode[] => {
    const order = orderTags(ctx, { requestId: newId(NOON), count, pointId });
    return getTagOrderSheet(ctx, order.id)?.codes ?? [];
  };

  /** Input as a client sends it, through the contract. 3.780 kg gross is 2.160 kg net. */
  const input = (code: string, reading: DeskReading = {}, more: Record<string, unknown> = {}) =>
    weighInInputSchema.parse({
      requestId: newId(NOON),
      code,
      scaleId: scale.id,
      occurredAt: NOON,
      readings: [readingOf(reading)],
      ...more,
    });
  const readingOf = (reading: DeskReading) => ({
    grossMilligrams: 3_780_000,
    containerId: crate.id,
    containerTareMilligrams: 1_600_000,
    sackId: sack.id,
    sackTareMilligrams: 20_000,
    ...reading,
  });
  const weigh = (
    code: string,
    reading: DeskReading = {},
    more: Record<string, unknown> = {},
    who: Parameters<TestScheme["ctx"]>[0] = "volunteer",
    now: Instant = NOON,
  ): WeighInReceipt => {
    const sent = input(code, reading, more);
    return weighBag(scheme.ctx(who, now, sent), sent);
  };
  return { ...scheme, point, scale, crate, sack, tags, input, readingOf, weigh };
}

export type WeighingDesk = ReturnType<typeof weighingDesk>;

/** Narrows a receipt; anything else fails the test. */
export function posted(receipt: WeighInReceipt): Extract<WeighInReceipt, { kind: "posted" }> {
  if (receipt.kind !== "posted") throw new Error(`not posted: ${JSON.stringify(receipt)}`);
  return receipt;
}
