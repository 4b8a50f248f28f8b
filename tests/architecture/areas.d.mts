export const AREAS: readonly string[];
export const EDGES: readonly string[];
export const AREA_FILES: readonly string[];
export const AREA_EXTRAS: Readonly<Record<string, readonly string[]>>;
export const LEAST_MODULES: number;
