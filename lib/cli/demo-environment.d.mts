export function demoEnvironment(demo: {
  port: number;
  databaseFile: string;
  storage: Readonly<Record<string, string>>;
  base: Readonly<Record<string, string | undefined>>;
}): Record<string, string | undefined>;
