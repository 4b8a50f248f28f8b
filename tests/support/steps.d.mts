type Counted = { passed: number; failed: number; skipped: number; failures: string[] };
export function countVitest(report: unknown): Counted;
export function countPlaywright(report: unknown): Counted;
