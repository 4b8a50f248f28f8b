/** Invariant: a limit is told from 80 % of it on, as near or as passed, and never stops anybody's work. */
import { formatKg } from "@/lib/core/mass";
import type { StorageStanding } from "../contract/limits";

const TOLD_FROM = 0.8;

export type LimitTold = { kind: "kg" | "days"; passed: boolean; sentence: string };

/** What a lead should know about the shed's limits. Cautions defer to the permit and the fire officer. */
export function limitsTold({ heldGrams, oldestDays, limits }: StorageStanding): LimitTold[] {
  const told: LimitTold[] = [];
  const { storageKg, storageDays } = limits;
  if (storageKg !== null && heldGrams >= storageKg * 1000 * TOLD_FROM) {
    told.push({
      kind: "kg",
      passed: heldGrams > storageKg * 1000,
      sentence: `${formatKg(heldGrams, 1)} kg lie in the shed; its limit is ${storageKg} kg.`,
    });
  }
  if (storageDays !== null && oldestDays >= storageDays * TOLD_FROM) {
    told.push({
      kind: "days",
      passed: oldestDays > storageDays,
      sentence: `The oldest plastic has lain here for ${oldestDays} days; the limit is ${storageDays} days.`,
    });
  }
  return told;
}
