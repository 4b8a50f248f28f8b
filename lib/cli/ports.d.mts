export function tryPort(port: number, host?: string): Promise<number | null>;
export function choosePort(asked: string | undefined): Promise<number>;
export function waitUntilHealthy(
  url: string,
  isGone: () => boolean,
  patienceMs?: number,
): Promise<boolean>;
