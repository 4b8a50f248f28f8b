/** The stand-in for the picture storage, as the launchers and browser tests start it. Plain Node, as they are. */
import { randomBytes } from "node:crypto";
import { setTimeout as wait } from "node:timers/promises";

/** Arguments of `node`, run in the project's folder. */
export const STORAGE_ARGS = ["--import", "tsx", "lib/cli/fake-storage.ts"];

/**
 * Settings that lead program and stand-in to each other, and to nothing else. Each call makes a key of its
 * own, so that no other program on this machine can speak to the stand-in.
 *
 * @param {{ port: number, folder: string }} storage where it listens, and where its files go
 * @returns {Record<string, string>}
 */
export function storageEnvironment({ port, folder }) {
  const token = {
    apiKey: `sk_fake_${randomBytes(24).toString("hex")}`,
    appId: "localdev01",
    regions: ["local"],
    ingestHost: "fake-storage.invalid",
  };
  return {
    STORAGE_MODE: "fake",
    STORAGE_FOLDER: folder,
    UPLOADTHING_TOKEN: Buffer.from(JSON.stringify(token)).toString("base64"),
    UPLOADTHING_INGEST_URL: `http://localhost:${port}`,
    // Whatever a .env says of the real service must not reach a program with the stand-in.
    UPLOADTHING_API_URL: "",
    UPLOADTHING_UFS_HOST: "",
    UPLOADTHING_UFS_APP_ID_LOCATION: "",
    UPLOADTHING_CALLBACK_URL: "",
  };
}

/**
 * Waits until the stand-in answers.
 *
 * @param {number} port
 * @param {() => boolean} isGone has it ended meanwhile?
 * @returns {Promise<boolean>}
 */
export async function waitUntilStoring(port, isGone, patienceMs = 30_000) {
  const deadline = Date.now() + patienceMs;
  while (Date.now() < deadline && !isGone()) {
    try {
      const answer = await fetch(`http://127.0.0.1:${port}/health`, {
        signal: AbortSignal.timeout(2000),
      });
      if (answer.ok) return true;
    } catch {
      // Not listening yet.
    }
    await wait(50);
  }
  return false;
}
