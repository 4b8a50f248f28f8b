/**
 * The picture storage: bytes under keys that the service gives out. Everything in it is private; a file is
 * read through an address that is signed for a minute and never leaves the server.
 */
import "server-only";
import { randomUUID } from "node:crypto";
import { UTApi, UTFile } from "uploadthing/server";
import { AppError } from "@/lib/core/errors";
import { settings } from "./env";
import { log } from "./logger";
import type { StorageSettings } from "./storage-settings";

export type StoredFile = { key: string; name: string; uploadedAt: number };

export type Storage = {
  /**
   * Keeps a JPEG.
   *
   * @param name begins with {@link OWN_NAME}
   * @returns its key
   * @throws AppError `photo-storage-down`
   */
  put(bytes: Uint8Array, name: string): Promise<string>;
  /**
   * The content of a file, as it comes.
   *
   * @returns null when the storage has no such file
   * @throws AppError `photo-storage-down`
   */
  open(key: string): Promise<Response | null>;
  /**
   * Lets go of files; one that is gone already is no error.
   *
   * @throws AppError `photo-storage-down`
   */
  remove(keys: readonly string[]): Promise<void>;
  /**
   * Every file of the program's, in no order.
   *
   * @throws AppError `photo-storage-down`
   */
  list(): Promise<StoredFile[]>;
};

/** Every file of ours is called so; what else lies in the same account is not touched. */
export const OWN_NAME = "bismar-";

const SIGNED_SECONDS = 60;
const PATIENCE_MS = 30_000;
const KEYS_A_REQUEST = 100;
const FILES_A_LIST = 500;

/** Its messages name the vendor, and its causes hold signed addresses: the kind of trouble is enough. */
function down(what: string, error: unknown): AppError {
  const kind = error instanceof Error ? error.name : typeof error;
  log.warn("storage-down", { what, kind });
  return new AppError("photo-storage-down");
}

/** Next keeps answers of its fetch for later unless told not to; and nobody waits for ever. */
const patientFetch: typeof fetch = (input, init) => {
  const patience = AbortSignal.timeout(PATIENCE_MS);
  const signal = init?.signal ? AbortSignal.any([init.signal, patience]) : patience;
  return fetch(input, { ...init, cache: "no-store", signal });
};

/** Opens the storage of these settings; nothing is asked of it yet. */
export function openStorage(found: StorageSettings): Storage {
  const api = new UTApi({
    token: found.token,
    apiUrl: found.apiUrl,
    ingestUrl: found.ingestUrl,
    ufsHost: found.fileHost,
    ufsAppIdLocation: found.appIdLocation,
    fetch: patientFetch,
    // Its log lines hold signed addresses; what goes wrong is logged here.
    logLevel: "None",
    logFormat: "json",
  });

  const putOnce = async (bytes: Uint8Array, name: string): Promise<string | null> => {
    // The key is a short hash of name and time, so only a name that nothing else has keeps keys apart.
    const file = new UTFile([new Uint8Array(bytes)], `${name}-${randomUUID()}.jpg`, {
      type: "image/jpeg",
    });
    const { data } = await api.uploadFiles(file, { acl: "private", contentDisposition: "inline" });
    return data?.key ?? null;
  };

  return {
    async put(bytes, name) {
      try {
        // A second try has another key, should the first one's have been taken.
        const key = (await putOnce(bytes, name)) ?? (await putOnce(bytes, name));
        if (key !== null) return key;
      } catch (error) {
        throw down("put", error);
      }
      throw down("put", null);
    },

    async open(key) {
      let answer: Response;
      try {
        const { ufsUrl } = await api.generateSignedURL(key, { expiresIn: SIGNED_SECONDS });
        answer = await patientFetch(ufsUrl);
      } catch (error) {
        throw down("open", error);
      }
      if (answer.ok) return answer;
      await answer.body?.cancel();
      if (answer.status === 404) return null;
      throw down(`open ${answer.status}`, null);
    },

    async remove(keys) {
      try {
        for (let from = 0; from < keys.length; from += KEYS_A_REQUEST) {
          await api.deleteFiles(keys.slice(from, from + KEYS_A_REQUEST));
        }
      } catch (error) {
        throw down("remove", error);
      }
    },

    async list() {
      const found: StoredFile[] = [];
      try {
        for (let offset = 0; ; offset += FILES_A_LIST) {
          const page = await api.listFiles({ limit: FILES_A_LIST, offset });
          for (const { key, name, uploadedAt, status } of page.files) {
            if (name.startsWith(OWN_NAME) && status !== "Deletion Pending") {
              found.push({ key, name, uploadedAt });
            }
          }
          if (!page.hasMore || page.files.length === 0) return found;
        }
      } catch (error) {
        throw down("list", error);
      }
    },
  };
}

let opened: Storage | undefined;

/** The process's storage, opened at first use. */
export function storage(): Storage {
  opened ??= openStorage(settings().storage);
  return opened;
}
