export const STORAGE_ARGS: string[];
export function storageEnvironment(storage: {
  port: number;
  folder: string;
}): Record<string, string>;
export function waitUntilStoring(
  port: number,
  isGone: () => boolean,
  patienceMs?: number,
): Promise<boolean>;
