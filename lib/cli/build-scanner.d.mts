export const WASM: { version: string; sha256: string };
export function buildScanner(root: string): Promise<void>;
