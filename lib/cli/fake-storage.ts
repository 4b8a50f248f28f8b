/**
 * `node --import tsx lib/cli/fake-storage.ts`: the stand-in for the hosted picture storage, for the demo,
 * development and tests. It refuses to run with anything that could be real.
 *
 * STORAGE_MODE=fake must be said; UPLOADTHING_TOKEN and UPLOADTHING_INGEST_URL as the program has them;
 * PUBLIC_URL is the program's address; STORAGE_FOLDER is where the files go.
 */
import path from "node:path";
import { isLoopback, SettingsError } from "@/lib/platform/settings-error";
import { readStorageSettings } from "@/lib/platform/storage-settings";
import { makeFakeStorage, type FakeStorageSettings } from "./fake-storage/server";

function readSettings(env: NodeJS.ProcessEnv): FakeStorageSettings {
  if (env.STORAGE_MODE !== "fake") {
    throw new SettingsError("STORAGE_MODE is not fake.");
  }
  const app = URL.canParse(env.PUBLIC_URL ?? "") ? new URL(env.PUBLIC_URL ?? "") : null;
  if (!app || !isLoopback(app)) {
    throw new SettingsError("PUBLIC_URL must be the program's address on this machine.");
  }
  if (!env.STORAGE_FOLDER) {
    throw new SettingsError("STORAGE_FOLDER is missing: the folder for the files.");
  }
  const { ingestUrl, apiKey, appId } = readStorageSettings(env, {
    production: false,
    loopback: true,
  });
  return {
    origin: ingestUrl,
    apiKey,
    appId,
    folder: path.resolve(env.STORAGE_FOLDER),
    appOrigin: app.origin,
  };
}

let settings: FakeStorageSettings;
try {
  settings = readSettings(process.env);
} catch (error) {
  if (!(error instanceof SettingsError)) throw error;
  process.stderr.write(`The stand-in for the picture storage does not start. ${error.message}\n`);
  process.exit(1);
}

const server = makeFakeStorage(settings);
server.once("error", (error) => {
  process.stderr.write(`The stand-in for the picture storage ended: ${error.message}\n`);
  process.exit(1);
});
server.listen(Number(new URL(settings.origin).port || 80), "127.0.0.1", () => {
  process.stdout.write(`The stand-in for the picture storage listens on ${settings.origin}.\n`);
});
for (const signal of ["SIGINT", "SIGTERM"] as const) process.once(signal, () => process.exit(0));
