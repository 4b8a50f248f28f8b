import { describe, expect, it } from "vitest";
import { storageEnvironment } from "@/lib/cli/storage-process.mjs";
import { SettingsError } from "@/lib/platform/settings-error";
import { readStorageSettings } from "@/lib/platform/storage-settings";

const LOCAL = { production: false, loopback: true };
const SHED = { production: true, loopback: false };

const token = (over: object = {}): string =>
  Buffer.from(
    JSON.stringify({ apiKey: "sk_live_0123", appId: "abc123", regions: ["sea1"], ...over }),
  ).toString("base64");
const HOSTED = { UPLOADTHING_TOKEN: token() };
const FAKE = storageEnvironment({ port: 4999, folder: "photos" });

type Environment = Record<string, string | undefined>;
type Server = typeof LOCAL;

function refusal(env: Environment, server: Server): string {
  try {
    readStorageSettings(env, server);
  } catch (error) {
    expect(error).toBeInstanceOf(SettingsError);
    return (error as Error).message;
  }
  throw new Error("it was not refused");
}

describe("settings of the picture storage", () => {
  it("are the hosted service's with its token alone", () => {
    expect(readStorageSettings(HOSTED, SHED)).toEqual({
      mode: "hosted",
      token: HOSTED.UPLOADTHING_TOKEN,
      apiKey: "sk_live_0123",
      appId: "abc123",
      ingestUrl: "https://sea1.ingest.uploadthing.com",
      apiUrl: "https://api.uploadthing.com",
      fileHost: "ufs.sh",
      appIdLocation: "subdomain",
      browserSource: "https://*.ingest.uploadthing.com",
    });
    expect(readStorageSettings(HOSTED, LOCAL).mode).toBe("hosted");
  });

  it("are the stand-in's where nothing is set, and where a launcher set them", () => {
    expect(readStorageSettings({}, LOCAL)).toMatchObject({
      mode: "fake",
      ingestUrl: "http://localhost:4151",
      apiUrl: "http://localhost:4151",
      fileHost: "localhost:4151",
      appIdLocation: "path",
      browserSource: "http://localhost:4151",
    });
    expect(readStorageSettings(FAKE, LOCAL)).toMatchObject({
      mode: "fake",
      ingestUrl: "http://localhost:4999",
      fileHost: "localhost:4999",
    });
  });

  it.each([
    ["nothing in production", {}, SHED, "UPLOADTHING_TOKEN"],
    [
      "nothing behind a public address",
      {},
      { production: false, loopback: false },
      "UPLOADTHING_TOKEN",
    ],
    ["an empty token in production", { UPLOADTHING_TOKEN: "" }, SHED, "UPLOADTHING_TOKEN"],
    ["the stand-in in production", FAKE, SHED, "STORAGE_MODE"],
    [
      "the stand-in behind a public address",
      FAKE,
      { production: false, loopback: false },
      "STORAGE_MODE",
    ],
    ["a mode that is none", { STORAGE_MODE: "both" }, LOCAL, "STORAGE_MODE"],
    ["a token that is none", { UPLOADTHING_TOKEN: "hello" }, SHED, "UPLOADTHING_TOKEN"],
    [
      "a token without a region",
      { UPLOADTHING_TOKEN: token({ regions: [] }) },
      SHED,
      "UPLOADTHING_TOKEN",
    ],
    ["a real token with the stand-in", { ...FAKE, ...HOSTED }, LOCAL, "UPLOADTHING_TOKEN"],
    [
      "the stand-in's token with the service",
      { ...FAKE, STORAGE_MODE: "hosted" },
      LOCAL,
      "UPLOADTHING_TOKEN",
    ],
    [
      "the stand-in's token and no mode",
      { ...FAKE, STORAGE_MODE: undefined },
      LOCAL,
      "UPLOADTHING_TOKEN",
    ],
    [
      "a token with one of the marks",
      { UPLOADTHING_TOKEN: token({ apiKey: "sk_fake_1" }) },
      SHED,
      "UPLOADTHING_TOKEN",
    ],
    [
      "a token with the other mark",
      { UPLOADTHING_TOKEN: token({ ingestHost: "fake-storage.invalid" }) },
      SHED,
      "UPLOADTHING_TOKEN",
    ],
    [
      "one mark and the stand-in",
      { STORAGE_MODE: "fake", UPLOADTHING_TOKEN: token({ apiKey: "sk_fake_1" }) },
      LOCAL,
      "UPLOADTHING_TOKEN",
    ],
    [
      "the service and a local address to send to",
      { ...HOSTED, UPLOADTHING_INGEST_URL: "http://localhost:4151" },
      SHED,
      "UPLOADTHING_INGEST_URL",
    ],
    [
      "the service and another API",
      { ...HOSTED, UPLOADTHING_API_URL: "https://elsewhere.example" },
      SHED,
      "UPLOADTHING_API_URL",
    ],
    [
      "the service and another file host",
      { ...HOSTED, UPLOADTHING_UFS_HOST: "localhost:4151" },
      SHED,
      "UPLOADTHING_UFS_HOST",
    ],
    [
      "the service and the stand-in's paths",
      { ...HOSTED, UPLOADTHING_UFS_APP_ID_LOCATION: "path" },
      SHED,
      "UPLOADTHING_UFS_APP_ID_LOCATION",
    ],
    [
      "a completion elsewhere",
      { ...HOSTED, UPLOADTHING_CALLBACK_URL: "https://elsewhere.example" },
      SHED,
      "UPLOADTHING_CALLBACK_URL",
    ],
    [
      "the stand-in off this machine",
      { ...FAKE, UPLOADTHING_INGEST_URL: "http://192.0.2.7:4151" },
      LOCAL,
      "UPLOADTHING_INGEST_URL",
    ],
    [
      "the stand-in by number, which the kit asks by https",
      { ...FAKE, UPLOADTHING_INGEST_URL: "http://127.0.0.1:4151" },
      LOCAL,
      "UPLOADTHING_INGEST_URL",
    ],
    [
      "the stand-in with the service's API",
      { ...FAKE, UPLOADTHING_API_URL: "https://api.uploadthing.com" },
      LOCAL,
      "UPLOADTHING_API_URL",
    ],
    [
      "the stand-in with the service's file host",
      { ...FAKE, UPLOADTHING_UFS_HOST: "ufs.sh" },
      LOCAL,
      "UPLOADTHING_UFS_HOST",
    ],
    [
      "the stand-in with the app in the host",
      { ...FAKE, UPLOADTHING_UFS_APP_ID_LOCATION: "subdomain" },
      LOCAL,
      "UPLOADTHING_UFS_APP_ID_LOCATION",
    ],
  ] as [string, Environment, Server, string][])("refuse %s", (_, env, server, named) => {
    expect(refusal(env, server)).toMatch(new RegExp(`^${named}\\b`));
  });

  it("never tell what is in a token", () => {
    const secret = "sk live with a space";
    expect(refusal({ UPLOADTHING_TOKEN: token({ apiKey: secret }) }, SHED)).not.toContain("space");
  });
});
