/** `npm run db:migrate`, and the first step of every start: settings are checked, the database is brought up to date. */
import { migrateDatabase } from "@/db/migrate";
import { readSettings } from "@/lib/platform/env";
import { SettingsError } from "@/lib/platform/settings-error";

try {
  const { databaseFile, mode } = readSettings(process.env);
  const applied = migrateDatabase(databaseFile);
  // The demo's own words are enough for its reader.
  if (applied > 0 && mode !== "demo") {
    console.error(
      `${databaseFile}: ${applied} ${applied === 1 ? "migration" : "migrations"} applied.`,
    );
  }
} catch (error) {
  if (!(error instanceof SettingsError)) throw error;
  console.error(`The program does not start. ${error.message}`);
  process.exitCode = 1;
}
