export function takeLock(file: string): { note(values: object): void; release(): void };
