export const NEXT_BIN: string;
export function fingerprint(root: string): string;
export function isBuilt(root: string): boolean;
