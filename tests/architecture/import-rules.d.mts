import type { ICruiseOptions } from "dependency-cruiser";

type Rule = { name: string; comment: string; severity: string; from: object; to: object };
export const IMPORT_RULES: Rule[];
export const CRUISE_OPTIONS: ICruiseOptions;
