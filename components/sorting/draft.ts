/** What lies on the table as typed, and what it comes to. */
import { newId } from "@/lib/core/ids";
import type { Form, Kind, WashState } from "@/lib/core/plastics";
import type { CloseSortingInput, PILE_POLYMERS } from "@/lib/sorting/contract/sortings";
import { netGramsOf, type Reading } from "@/lib/scales/rules/reading";
import { emptyReading, type ReadingValue } from "../weighing/form-values";
import { readReading, type ListedTare } from "../weighing/read-form";

export type PilePolymer = (typeof PILE_POLYMERS)[number];

export type PileDraft = {
  id: string;
  polymer: PilePolymer | "";
  colourCode: string;
  kind: Kind | "";
  form: Form;
  wash: WashState;
  /** The lot that somebody chose for it; null: it goes where such piles go by themselves. */
  lot: number | "new" | null;
  /** Of a pile that is corrected: the lot it lies in, which may be named though it is closed. */
  ownLot?: number;
  reading: ReadingValue;
};
export type RejectDraft = { id: string; reason: string; reading: ReadingValue };
/** Empty scale: the one that stands beside this device. */
export type Draft = { scaleId: string; piles: PileDraft[]; rejects: RejectDraft[] };

export const EMPTY_DRAFT: Draft = { scaleId: "", piles: [], rejects: [] };

/** A new pile: of the last one's polymer and kind, because piles of one bag are mostly alike. */
export function newPile(last: PileDraft | undefined): PileDraft {
  return {
    id: newId(),
    polymer: last?.polymer ?? "",
    colourCode: "",
    kind: last?.kind ?? "",
    form: last?.form ?? "whole",
    wash: last?.wash ?? "as-received",
    lot: null,
    reading: emptyReading(last?.reading),
  };
}

export function newReject(last: ReadingValue | undefined): RejectDraft {
  return { id: newId(), reason: "", reading: emptyReading(last) };
}

/** Net in grams, or null while the weight cannot be read. */
export function netOf(value: ReadingValue, tares: readonly ListedTare[]): number | null {
  const read = readReading(value, tares);
  return read.ok ? netGramsOf([read.reading]) : null;
}

/** Every reading that can be read, in the order piles, rejects. */
export function readingsOf(
  draft: Pick<Draft, "piles" | "rejects">,
  tares: readonly ListedTare[],
): Reading[] {
  return [...draft.piles, ...draft.rejects].flatMap(({ reading }) => {
    const read = readReading(reading, tares);
    return read.ok ? [read.reading] : [];
  });
}

type Body = Pick<CloseSortingInput, "piles" | "rejects">;
type SentReading = Body["piles"][number]["reading"];

/** Piles and rejects as the endpoint takes them; null while one of them is incomplete. */
export function bodyOf(
  draft: Pick<Draft, "piles" | "rejects">,
  tares: readonly ListedTare[],
): Body | null {
  const piles: Body["piles"] = [];
  const rejects: Body["rejects"] = [];
  for (const {
    id: _id,
    ownLot: _own,
    polymer,
    kind,
    colourCode,
    reading,
    ...rest
  } of draft.piles) {
    const read = readReading(reading, tares);
    if (!read.ok || polymer === "" || kind === "" || colourCode === "") return null;
    // The ids come from the lists of this program; the server checks each.
    piles.push({
      ...rest,
      polymer,
      kind,
      colourCode,
      reading: read.reading as SentReading,
    });
  }
  for (const { reason, reading } of draft.rejects) {
    const read = readReading(reading, tares);
    if (!read.ok || reason === "") return null;
    rejects.push({ reason, reading: read.reading as SentReading });
  }
  return { piles, rejects };
}
