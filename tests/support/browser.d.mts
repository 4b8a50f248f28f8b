export function installedBrowser(): string | null;
export function requireBrowser(say: (line: string) => void): string | null;
