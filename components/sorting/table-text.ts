/**
 * What lies on a table as the text that is kept on the server and on this device. The server never reads it, so
 * whoever reads it here believes nothing: another version, or another program, may have written it.
 */
import {
  FORMS,
  KINDS,
  POLYMERS,
  WASH_STATES,
  type Form,
  type Kind,
  type WashState,
} from "@/lib/core/plastics";
import { NO_TARE, type ReadingValue, type TareValue } from "../weighing/form-values";
import {
  EMPTY_DRAFT,
  type Draft,
  type PileDraft,
  type PilePolymer,
  type RejectDraft,
} from "./draft";

/** The bags that were tipped, by their codes, and what was weighed of them. */
export type Table = { codes: readonly string[]; draft: Draft };

/** Two tables with the same text are the same. The order of the bags says nothing. */
export function sameTable(one: Table, other: Table): boolean {
  return (
    draftText(one.draft) === draftText(other.draft) &&
    [...one.codes].sort().join() === [...other.codes].sort().join()
  );
}

export function draftText({ scaleId, piles, rejects }: Draft): string {
  return JSON.stringify({
    scaleId,
    // Field by field, in this order: texts are compared.
    piles: piles.map(({ id, polymer, colourCode, kind, form, wash, lot, reading }) => ({
      id,
      polymer,
      colourCode,
      kind,
      form,
      wash,
      lot,
      reading: readingText(reading),
    })),
    rejects: rejects.map(({ id, reason, reading }) => ({
      id,
      reason,
      reading: readingText(reading),
    })),
  });
}

const readingText = ({ gross, container, sack }: ReadingValue): ReadingValue => ({
  gross,
  container: { choice: container.choice, text: container.text },
  sack: { choice: sack.choice, text: sack.text },
});

/** What can be read of it; a pile or reject that lacks its id is left out. */
export function readDraftText(text: string): Draft {
  let found: unknown;
  try {
    found = JSON.parse(text);
  } catch {
    return EMPTY_DRAFT;
  }
  if (!isRecord(found)) return EMPTY_DRAFT;
  return {
    scaleId: textOf(found.scaleId),
    piles: listOf(found.piles).flatMap(readPile),
    rejects: listOf(found.rejects).flatMap(readReject),
  };
}

type Fields = Readonly<Record<string, unknown>>;

const isRecord = (value: unknown): value is Fields =>
  typeof value === "object" && value !== null && !Array.isArray(value);
const listOf = (value: unknown): Fields[] => (Array.isArray(value) ? value.filter(isRecord) : []);
const textOf = (value: unknown): string => (typeof value === "string" ? value.slice(0, 200) : "");

function oneOf<Known extends string, Other>(
  known: readonly Known[],
  value: unknown,
  other: Other,
): Known | Other {
  return known.find((one) => one === value) ?? other;
}

const PILE_POLYMERS: readonly PilePolymer[] = [...POLYMERS, "not-sure"];

function readPile(fields: Fields): PileDraft[] {
  const id = textOf(fields.id);
  if (id === "") return [];
  const { lot } = fields;
  return [
    {
      id,
      polymer: oneOf(PILE_POLYMERS, fields.polymer, ""),
      colourCode: textOf(fields.colourCode),
      kind: oneOf<Kind, "">(KINDS, fields.kind, ""),
      form: oneOf<Form, Form>(FORMS, fields.form, "whole"),
      wash: oneOf<WashState, WashState>(WASH_STATES, fields.wash, "as-received"),
      lot: lot === "new" || (typeof lot === "number" && Number.isInteger(lot)) ? lot : null,
      reading: readReadingText(fields.reading),
    },
  ];
}

function readReject(fields: Fields): RejectDraft[] {
  const id = textOf(fields.id);
  if (id === "") return [];
  return [{ id, reason: textOf(fields.reason), reading: readReadingText(fields.reading) }];
}

function readReadingText(value: unknown): ReadingValue {
  const fields = isRecord(value) ? value : {};
  return {
    gross: textOf(fields.gross),
    container: readTareText(fields.container),
    sack: readTareText(fields.sack),
  };
}

function readTareText(value: unknown): TareValue {
  if (!isRecord(value)) return NO_TARE;
  return { choice: textOf(value.choice), text: textOf(value.text) };
}
