import { spawnSync } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest";
import { STORAGE_ARGS, storageEnvironment } from "@/lib/cli/storage-process.mjs";
import { makePictureFile, photoDesk, type PhotoDesk } from "@/tests/support/photo-desk";

const ROOT = path.resolve(import.meta.dirname, "../../..");
const folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-storage-"));
const GOOD = {
  ...storageEnvironment({ port: 1, folder }),
  PUBLIC_URL: "http://localhost:3000",
};
const real = Buffer.from(
  JSON.stringify({ apiKey: "sk_live_1", appId: "abc", regions: ["sea1"] }),
).toString("base64");
const oneMark = Buffer.from(
  JSON.stringify({ apiKey: "sk_fake_1", appId: "abc", regions: ["local"] }),
).toString("base64");

describe("the stand-in does not start", () => {
  afterAll(() => fs.rmSync(folder, { recursive: true, force: true }));

  it.each([
    ["unless it is asked for by name", { STORAGE_MODE: "" }, "STORAGE_MODE"],
    ["for the service", { STORAGE_MODE: "hosted" }, "STORAGE_MODE"],
    ["with a real token", { UPLOADTHING_TOKEN: real }, "UPLOADTHING_TOKEN"],
    ["with a token that has one mark only", { UPLOADTHING_TOKEN: oneMark }, "UPLOADTHING_TOKEN"],
    [
      "off this machine",
      { UPLOADTHING_INGEST_URL: "http://192.0.2.1:4151" },
      "UPLOADTHING_INGEST_URL",
    ],
    ["by https", { UPLOADTHING_INGEST_URL: "https://localhost:4151" }, "UPLOADTHING_INGEST_URL"],
    ["for a program elsewhere", { PUBLIC_URL: "https://shed.saltmarsh.example" }, "PUBLIC_URL"],
    ["for no program", { PUBLIC_URL: "" }, "PUBLIC_URL"],
    ["without a folder", { STORAGE_FOLDER: "" }, "STORAGE_FOLDER"],
  ])("%s", (_, change, named) => {
    const { status, stderr, stdout } = spawnSync(process.execPath, STORAGE_ARGS, {
      cwd: ROOT,
      encoding: "utf8",
      timeout: 20_000,
      env: { PATH: process.env.PATH, NODE_ENV: "test", ...GOOD, ...change },
    });
    expect([status, stdout]).toEqual([1, ""]);
    expect(stderr).toContain(`does not start. ${named}`);
    expect(stderr).not.toContain("    at ");
    expect(fs.readdirSync(folder)).toEqual([]);
  });
});

describe("the stand-in", () => {
  let desk: PhotoDesk;
  let picture: Buffer;
  beforeAll(async () => {
    desk = await photoDesk();
    picture = await makePictureFile();
  });
  afterEach(() => desk.clear());
  afterAll(() => desk.close());

  const call = (at: string, body: unknown, key: string | null = desk.apiKey) =>
    fetch(`${desk.store.url}${at}`, {
      method: "POST",
      body: JSON.stringify(body),
      headers: {
        "content-type": "application/json",
        ...(key === null ? {} : { "x-uploadthing-api-key": key }),
      },
    });
  const announcement = {
    fileKeys: ["A".repeat(36)],
    metadata: {},
    isDev: false,
    callbackUrl: "",
    callbackSlug: "photo",
    awaitServerData: true,
  };

  it("listens on this machine's own address alone", async () => {
    const others = Object.values(os.networkInterfaces())
      .flatMap((list) => list ?? [])
      .filter(({ internal, family }) => !internal && family === "IPv4")
      .map(({ address }) => address);
    const { port } = new URL(desk.store.url);
    for (const address of others) {
      await expect(fetch(`http://${address}:${port}/health`)).rejects.toThrow();
    }
    expect((await fetch(`${desk.store.url}/health`)).status).toBe(200);
  });

  it("hears the program by its key only", async () => {
    for (const key of [null, "", "sk_fake_other", `${desk.apiKey}x`]) {
      for (const at of [
        "/route-metadata",
        "/callback-result",
        "/v6/listFiles",
        "/v6/deleteFiles",
      ]) {
        expect((await call(at, {}, key)).status).toBe(401);
      }
    }
    expect((await call("/v6/listFiles", {})).status).toBe(200);
  });

  it("calls nobody but the program's own completion", async () => {
    for (const callbackUrl of [
      "http://localhost:1/api/uploadthing",
      `${desk.appUrl}/api/elsewhere`,
      `${desk.appUrl}.evil.example/api/uploadthing`,
    ]) {
      const answer = await call("/route-metadata", { ...announcement, callbackUrl });
      expect(answer.status).toBe(400);
    }
    const own = { ...announcement, callbackUrl: `${desk.appUrl}/api/uploadthing?slug=photo` };
    expect((await call("/route-metadata", own)).status).toBe(200);
    expect((await call("/route-metadata", { ...own, isDev: true })).status).toBe(400);
  });

  it("serves a file to nobody without a signature", async () => {
    const key = await desk.storage.put(picture, "bismar-large");
    const place = `${desk.store.url}/a/${desk.appId}/${key}`;
    expect((await fetch(place)).status).toBe(401);
    expect((await fetch(`${place}?expires=99999999999999&signature=hmac-sha256%3D00`)).status).toBe(
      401,
    );
    const signed = await desk.storage.open(key);
    expect(signed?.headers.get("content-security-policy")).toContain("sandbox");
    expect(Buffer.from(await signed!.arrayBuffer()).equals(picture)).toBe(true);
    expect(await desk.storage.open("A".repeat(36))).toBeNull();
  });

  it("lets the program's pages send, and no other site's", async () => {
    const { url } = await desk.addressFor(desk.input(), { size: picture.byteLength });
    const ask = (origin: string, method: string) =>
      fetch(url, { method, headers: { origin, "access-control-request-method": "PUT" } });
    const own = await ask(desk.appUrl, "OPTIONS");
    expect(Object.fromEntries(own.headers)).toMatchObject({
      "access-control-allow-origin": desk.appUrl,
      "access-control-allow-methods": "HEAD, PUT",
      "access-control-expose-headers": "x-ut-range-start",
    });
    expect((await ask(desk.appUrl, "HEAD")).headers.get("x-ut-range-start")).toBe("0");
    for (const method of ["OPTIONS", "HEAD"]) {
      const other = await ask("http://evil.example", method);
      expect(other.headers.has("access-control-allow-origin")).toBe(false);
    }
  });

  it("drops a file whose completion cannot be called or does not answer", async () => {
    const { url, key } = await desk.addressFor(desk.input(), { size: picture.byteLength });
    // As when the program was ended in between: the stand-in announces to an address where nobody is.
    const gone = {
      ...announcement,
      fileKeys: [key],
      callbackUrl: `${desk.appUrl}/api/uploadthing`,
    };
    expect((await call("/route-metadata", { ...gone, callbackSlug: "elsewhere" })).status).toBe(
      200,
    );
    expect((await desk.put(url, picture)).status).toBe(404);
    await call("/route-metadata", { ...gone, metadata: null });
    const answer = (await (await desk.put(url, picture)).json()) as { error?: string };
    expect(answer.error).toMatch(/^the completion/);
    expect(desk.namesIn("files")).toEqual([]);
    expect(desk.photoCount()).toBe(0);
  });

  it("lists in pages, and deletes what there is", async () => {
    const keys = [];
    for (let n = 0; n < 3; n += 1) keys.push(await desk.storage.put(picture, "bismar-large"));
    const page = (await (await call("/v6/listFiles", { limit: 2, offset: 0 })).json()) as {
      hasMore: boolean;
      files: { key: string }[];
    };
    expect([page.hasMore, page.files.length]).toEqual([true, 2]);
    const gone = await call("/v6/deleteFiles", { fileKeys: [...keys, "A".repeat(36), "../etc"] });
    expect(await gone.json()).toEqual({ success: true, deletedCount: 3 });
    expect(await desk.storage.list()).toEqual([]);
  });
});
