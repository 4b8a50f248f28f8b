/**
 * Settings of the picture storage. Everything is the hosted service's, or everything is the local stand-in's:
 * a mix would send the real key to a stranger, or real pictures to a process that ends with the demo. It is
 * refused and names the variable. What is read here is handed to the service's kit in full, so that the kit
 * never looks into the environment itself.
 */
import * as z from "zod";
import { SettingsError } from "./settings-error";

export type StorageSettings = {
  mode: "fake" | "hosted";
  /** As the service's kit wants it: JSON in base64. */
  token: string;
  apiKey: string;
  appId: string;
  /** Takes files and announcements; without a slash at the end. */
  ingestUrl: string;
  apiUrl: string;
  /** Serves files: a host, no address. */
  fileHost: string;
  appIdLocation: "subdomain" | "path";
  /** What a page may connect to in order to send a file, as a source of connect-src. */
  browserSource: string;
};

/** Both marks are in every token of the stand-in, and in none of the service's. */
export const FAKE_KEY_MARK = "sk_fake_";
export const FAKE_HOST_MARK = "fake-storage.invalid";

const HOSTED_INGEST_HOST = "ingest.uploadthing.com";
/** Where the stand-in listens when nothing is set: the developer's own machine. */
const DEVELOPMENT_URL = "http://localhost:4151";
const DEVELOPMENT_KEY = `${FAKE_KEY_MARK}development`;

/** Variables that would lead away from what the mode means. */
const OVERRIDES = [
  "UPLOADTHING_INGEST_URL",
  "UPLOADTHING_API_URL",
  "UPLOADTHING_UFS_HOST",
  "UPLOADTHING_UFS_APP_ID_LOCATION",
] as const;

const tokenSchema = z.object({
  apiKey: z.string().regex(/^sk_\w+$/),
  appId: z.string().regex(/^[A-Za-z0-9]+$/),
  regions: z.array(z.string().regex(/^[a-z0-9-]+$/)).nonempty(),
  ingestHost: z
    .string()
    .regex(/^[a-z0-9.-]+$/)
    .default(HOSTED_INGEST_HOST),
});
type Token = z.output<typeof tokenSchema>;

type Environment = Readonly<Record<string, string | undefined>>;

/** A token that only the stand-in takes. */
export function makeFakeToken(key: string): string {
  const token = {
    apiKey: key,
    appId: "localdev01",
    regions: ["local"],
    ingestHost: FAKE_HOST_MARK,
  };
  return Buffer.from(JSON.stringify(token)).toString("base64");
}

function readToken(text: string): Token {
  try {
    return tokenSchema.parse(JSON.parse(Buffer.from(text, "base64").toString("utf8")));
  } catch {
    // What is in it may be a key, so the cause is not told.
    throw new SettingsError(
      "UPLOADTHING_TOKEN cannot be read. Copy it again from the service's page, in one line.",
    );
  }
}

const hasBothMarks = (token: Token): boolean =>
  token.apiKey.startsWith(FAKE_KEY_MARK) && token.ingestHost === FAKE_HOST_MARK;
const hasAnyMark = (token: Token): boolean =>
  token.apiKey.startsWith(FAKE_KEY_MARK) || token.ingestHost === FAKE_HOST_MARK;

function readFake(env: Environment): StorageSettings {
  const text = env.UPLOADTHING_TOKEN || makeFakeToken(DEVELOPMENT_KEY);
  const token = readToken(text);
  if (!hasBothMarks(token)) {
    throw new SettingsError(
      "UPLOADTHING_TOKEN is not the stand-in's, but STORAGE_MODE is fake. Remove one of them.",
    );
  }
  const address = env.UPLOADTHING_INGEST_URL || DEVELOPMENT_URL;
  const url = URL.canParse(address) ? new URL(address) : null;
  // By this name alone: the kit serves files by http only from a host with "local" in it.
  if (url?.protocol !== "http:" || url.hostname !== "localhost" || url.href !== `${url.origin}/`) {
    throw new SettingsError(
      "UPLOADTHING_INGEST_URL must be http://localhost and a port while STORAGE_MODE is fake.",
    );
  }
  const wanted = {
    UPLOADTHING_INGEST_URL: url.origin,
    UPLOADTHING_API_URL: url.origin,
    UPLOADTHING_UFS_HOST: url.host,
    UPLOADTHING_UFS_APP_ID_LOCATION: "path",
  } as const;
  for (const name of OVERRIDES) {
    const given = env[name]?.replace(/\/$/, "");
    if (given && given !== wanted[name]) {
      throw new SettingsError(
        `${name} must be ${wanted[name]} or left out while STORAGE_MODE is fake.`,
      );
    }
  }
  return {
    mode: "fake",
    token: text,
    apiKey: token.apiKey,
    appId: token.appId,
    ingestUrl: url.origin,
    apiUrl: url.origin,
    fileHost: url.host,
    appIdLocation: "path",
    browserSource: url.origin,
  };
}

function readHosted(env: Environment): StorageSettings {
  const text = env.UPLOADTHING_TOKEN;
  if (!text) {
    throw new SettingsError(
      "UPLOADTHING_TOKEN is missing: the token of your app at the picture storage (README, Photos).",
    );
  }
  const token = readToken(text);
  if (hasAnyMark(token)) {
    throw new SettingsError(
      "UPLOADTHING_TOKEN is the stand-in's, which is not for real pictures. Use your own app's.",
    );
  }
  for (const name of OVERRIDES) {
    if (env[name]) {
      throw new SettingsError(
        `${name} leads away from the picture storage that UPLOADTHING_TOKEN belongs to. Remove it.`,
      );
    }
  }
  return {
    mode: "hosted",
    token: text,
    apiKey: token.apiKey,
    appId: token.appId,
    ingestUrl: `https://${token.regions[0]}.${token.ingestHost}`,
    apiUrl: "https://api.uploadthing.com",
    fileHost: "ufs.sh",
    appIdLocation: "subdomain",
    browserSource: `https://*.${token.ingestHost}`,
  };
}

/**
 * @param env usually process.env
 * @param server what kind of start it is, and whether people come from this machine only
 * @throws SettingsError naming the variable that is missing, wrong or of the other kind
 */
export function readStorageSettings(
  env: Environment,
  server: { production: boolean; loopback: boolean },
): StorageSettings {
  const asked = env.STORAGE_MODE || undefined;
  if (asked !== undefined && asked !== "fake" && asked !== "hosted") {
    throw new SettingsError("STORAGE_MODE is neither fake nor hosted.");
  }
  const mode =
    asked ?? (env.UPLOADTHING_TOKEN || server.production || !server.loopback ? "hosted" : "fake");
  if (env.UPLOADTHING_CALLBACK_URL) {
    throw new SettingsError("UPLOADTHING_CALLBACK_URL follows PUBLIC_URL by itself. Remove it.");
  }
  if (mode === "hosted") return readHosted(env);
  if (server.production) {
    throw new SettingsError("STORAGE_MODE=fake is not for production. Set UPLOADTHING_TOKEN.");
  }
  if (!server.loopback) {
    throw new SettingsError(
      "STORAGE_MODE=fake is only for a PUBLIC_URL on this machine: no other could send a picture.",
    );
  }
  return readFake(env);
}
