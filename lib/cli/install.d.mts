export function firstStale(root: string): string | null;
