export function demoEnvironment(demo: {
  port: number;
  databaseFile: string;
  base: Readonly<Record<string, string | undefined>>;
}): Record<string, string | undefined>;
