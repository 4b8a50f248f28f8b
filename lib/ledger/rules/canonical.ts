/**
 * The text whose SHA-256, after the previous entry's hash, is an entry's hash.
 *
 * Invariant: one JSON array of integers and codes in fixed order; no names, no free text. The codes of
 * holders, materials and origins are in it beside their numbers, so that changing one of those rows later
 * breaks the chain too.
 */
import type { EntryKind } from "../terms";
import type { Composition } from "./holding";

export type CanonicalLine = {
  seq: number;
  account: string;
  cause: string | null;
  /** "12:lot:K7Q29F4M" */
  holder: string | null;
  /** "17:PE-HD:lids:blue:flake:dry" */
  material: string;
  grams: number;
  after: number | null;
  basis: string | null;
  scaleNumber: number | null;
  mpeMilligrams: number | null;
  parts: Composition;
};

export type CanonicalEntry = {
  id: number;
  actId: number;
  kind: EntryKind;
  ruleVersion: number;
  occurredAt: number;
  bookedDay: string;
  concernsDay: string | null;
  recordedAt: number;
  doneBy: string;
  sentBy: string;
  device: string | null;
  subject: string;
  reverses: number | null;
  noteHash: string | null;
  lines: readonly CanonicalLine[];
  /** "3:donated:<point id>", one for each origin in the lines, by number. */
  origins: readonly string[];
};

/** @returns the JSON text; hash = SHA-256(previous hash in hexadecimal + this text) */
export function canonicalText(entry: CanonicalEntry): string {
  return JSON.stringify([
    entry.id,
    entry.actId,
    entry.kind,
    entry.ruleVersion,
    entry.occurredAt,
    entry.bookedDay,
    entry.concernsDay,
    entry.recordedAt,
    entry.doneBy,
    entry.sentBy,
    entry.device,
    entry.subject,
    entry.reverses,
    entry.noteHash,
    entry.lines.map((line) => [
      line.seq,
      line.account,
      line.cause,
      line.holder,
      line.material,
      line.grams,
      line.after,
      line.basis,
      line.scaleNumber,
      line.mpeMilligrams,
      line.parts.O.flat(),
      line.parts.H.flat(),
    ]),
    entry.origins,
  ]);
}

export function materialCode(material: {
  id: number;
  polymer: string | null;
  kind: string | null;
  colourCode: string | null;
  form: string | null;
  wash: string | null;
}): string {
  return [
    material.id,
    material.polymer ?? "",
    material.kind ?? "",
    material.colourCode ?? "",
    material.form ?? "",
    material.wash ?? "",
  ].join(":");
}
