/** Fields that the catalogue's forms share. Issues are codes of `fieldSentence`; no union hides them. */
import * as z from "zod";
import { maybeMeasureSchema, measureSchema } from "@/lib/core/measure";
import { CEILING_CELSIUS, HEATABLE, type Heatable } from "../terms";

const typedSchema = z.union([z.string().max(40), z.number()]);
const isLeftEmpty = (typed: string | number | null): typed is "" | null =>
  typed === null || (typeof typed === "string" && typed.trim() === "");

/** What is wrong with a whole number as typed, if anything: a code of `fieldSentence`. */
function wholeProblem(typed: string | number, least: number, most: number): string | null {
  if (isLeftEmpty(typed)) return "empty";
  if (!/^\d{1,9}$/.test(String(typed).trim())) return "whole-number";
  return Number(typed) < least || Number(typed) > most ? "out-of-range" : null;
}

/** A whole number as typed. */
export const whole = (least: number, most: number) =>
  typedSchema.transform((typed, check): number => {
    const message = wholeProblem(typed, least, most);
    if (message === null) return Number(typed);
    check.addIssue({ code: "custom", message });
    return z.NEVER;
  });
/** The same where it may be left empty. */
export const maybeWhole = (least: number, most: number) =>
  typedSchema.nullable().transform((typed, check): number | null => {
    if (isLeftEmpty(typed)) return null;
    const message = wholeProblem(typed, least, most);
    if (message === null) return Number(typed);
    check.addIssue({ code: "custom", message });
    return z.NEVER;
  });

/** A part of a whole: never above 100 %. */
export const share = (least = 1) =>
  measureSchema("share", least).refine((thousandths) => thousandths <= 1000, "out-of-range");
export const maybeShare = (least = 1) =>
  maybeMeasureSchema("share", least).refine(
    (thousandths) => thousandths === null || thousandths <= 1000,
    "out-of-range",
  );

/** A polymer without a temperature has none on this machine. */
const setPointSchema = z
  .object({ polymer: z.enum(HEATABLE), celsius: maybeWhole(40, 400) })
  .refine(({ polymer, celsius }) => celsius === null || celsius <= CEILING_CELSIUS[polymer], {
    path: ["celsius"],
    error: "above-ceiling",
  });
type SetPoint = { polymer: Heatable; celsius: number };

/** Temperatures of a machine, one for a polymer at most; what was left empty is left out. */
export const setPointsSchema = z
  .array(setPointSchema)
  .max(HEATABLE.length, "too_big")
  .refine(
    (points) => new Set(points.map(({ polymer }) => polymer)).size === points.length,
    "polymer-twice",
  )
  .transform((points) => points.filter((one): one is SetPoint => one.celsius !== null));
