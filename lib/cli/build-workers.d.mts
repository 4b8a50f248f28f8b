export function buildWorkers(root: string): Promise<void>;
