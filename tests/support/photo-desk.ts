/**
 * A weighing desk with a picture storage: the stand-in runs as a process of its own, and calls the program's
 * handlers back through a small server, as it does with the whole program. Nothing between is replaced.
 */
import { randomUUID } from "node:crypto";
import fs from "node:fs";
import http from "node:http";
import os from "node:os";
import path from "node:path";
import sharp from "sharp";
import { vi } from "vitest";
import { tryPort } from "@/lib/cli/ports.mjs";
import { sign } from "@/lib/cli/fake-storage/signature";
import { storageEnvironment } from "@/lib/cli/storage-process.mjs";
import type { ProblemDocument } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import { uploadRoute } from "@/lib/http/upload-route";
import { settings } from "@/lib/platform/env";
import { storage } from "@/lib/platform/storage";
import type { PhotoInput, Uploaded } from "@/lib/uploads/contract";
import { PHOTO_ROUTE } from "@/lib/uploads/terms";
import { serveFrom } from "./call-handler";
import { makeSession } from "./session";
import { storageProcess } from "./storage-process";
import { weighingDesk } from "./weighing-desk";

export type SentFile = { name?: string; type?: string; size?: number };

/** Hands what the stand-in sends to the handler of `/api/uploadthing`. */
async function callbackServer(port: number): Promise<http.Server> {
  const server = http.createServer((request, response) => {
    const chunks: Buffer[] = [];
    request.on("data", (chunk: Buffer) => chunks.push(chunk));
    request.on("end", () => {
      const headers = Object.entries(request.headers).map(([name, value]): [string, string] => [
        name,
        String(value),
      ]);
      const url = `http://localhost:${port}${request.url ?? "/"}`;
      const body = Buffer.concat(chunks);
      void uploadRoute(new Request(url, { method: "POST", headers, body })).then(async (answer) => {
        response.writeHead(answer.status, Object.fromEntries(answer.headers));
        response.end(Buffer.from(await answer.arrayBuffer()));
      });
    });
  });
  await new Promise<void>((resolve) => server.listen(port, "localhost", resolve));
  return server;
}

/** The kit warns about its own calls, on every file; anything else is still said. */
function quietenKit(): void {
  const say = console.warn.bind(console);
  vi.spyOn(console, "warn").mockImplementation((...said: unknown[]) => {
    if (!String(said[0]).includes("[deprecated]")) say(...said);
  });
}

/** Starts everything. Call it in `beforeAll`: the process's settings are read once. */
export async function photoDesk() {
  quietenKit();
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-photos-"));
  const [port, storagePort] = [await tryPort(0), await tryPort(0)];
  if (port === null || storagePort === null) throw new Error("No port is free.");
  const url = `http://localhost:${port}`;
  const environment = storageEnvironment({
    port: storagePort,
    folder: path.join(folder, "photos"),
  });
  Object.assign(process.env, environment, { PUBLIC_URL: url });
  if (settings().publicUrl !== url) throw new Error("settings were read before the desk was made");
  const store = storageProcess(environment, url);
  const [callbacks] = await Promise.all([callbackServer(port), store.start()]);
  const desk = weighingDesk();
  serveFrom(desk.db);
  const cookies = new Map<Role, string>();
  for (const role of ["donor", "volunteer", "lead", "coordinator"] as const) {
    cookies.set(role, (await makeSession(desk.db, desk.people[role])).header);
  }
  const { apiKey, appId } = settings().storage;

  const weighIn = (): string => {
    const receipt = desk.weigh(desk.tags(1)[0] ?? "");
    if (receipt.kind !== "posted") throw new Error("the weigh-in was not posted");
    return receipt.weighInId;
  };
  const lot = (): string => {
    const oneKind = { polymer: "PE-HD", kind: "lids", colourCode: "blue", oneKind: true };
    desk.weigh(desk.tags(1)[0] ?? "", {}, oneKind);
    return desk.db.reader.client.prepare("select id from lots").pluck().get() as string;
  };
  const input = (over: Partial<PhotoInput> = {}): PhotoInput => ({
    photoId: newId<"photo">(),
    subjectKind: "weigh-in",
    subjectId: newId(),
    purpose: "view",
    ...over,
  });

  /** The first step: may this be sent, and where to? */
  const ask = (
    sent: unknown,
    files: readonly SentFile[],
    call: { role?: Role | null; headers?: Record<string, string>; slug?: string } = {},
  ): Promise<Response> => {
    const { role = "volunteer", slug = PHOTO_ROUTE } = call;
    const body = JSON.stringify({
      input: sent,
      files: files.map((file) => ({
        name: "picture.jpg",
        type: "image/jpeg",
        size: 1000,
        lastModified: 1,
        ...file,
      })),
    });
    return uploadRoute(
      new Request(`${url}/api/uploadthing?actionType=upload&slug=${slug}`, {
        method: "POST",
        body,
        headers: {
          "content-type": "application/json",
          "sec-fetch-site": "same-origin",
          "x-uploadthing-version": "7.7.4",
          ...(role === null ? {} : { cookie: cookies.get(role) ?? "" }),
          ...call.headers,
        },
      }),
    );
  };
  const refusal = async (answer: Promise<Response>): Promise<ProblemDocument> => {
    const response = await answer;
    const problem = (await response.json()) as ProblemDocument;
    if (problem.status !== response.status) throw new Error("status and document differ");
    return problem;
  };
  /** Where a file of this size may be sent to. */
  const addressFor = async (sent: unknown, file: SentFile, role: Role = "volunteer") => {
    const answer = await ask(sent, [file], { role });
    if (!answer.ok) throw new Error(`refused: ${await answer.text()}`);
    const [place] = (await answer.json()) as { url: string; key: string; name: string }[];
    if (!place) throw new Error("no address");
    return place;
  };
  /** The second step, as a browser does it. */
  const put = (address: string, bytes: Uint8Array): Promise<Response> => {
    const form = new FormData();
    form.append("file", new File([new Uint8Array(bytes)], "picture.jpg", { type: "image/jpeg" }));
    return fetch(address, {
      method: "PUT",
      body: form,
      headers: { range: "bytes=0-", origin: url },
    });
  };
  /** Both steps. */
  const upload = async (
    sent: unknown,
    bytes: Uint8Array,
    role: Role = "volunteer",
  ): Promise<Uploaded> => {
    const { url: address } = await addressFor(sent, { size: bytes.byteLength }, role);
    const answer = await put(address, bytes);
    if (!answer.ok) throw new Error(`the storage answered ${answer.status}`);
    return ((await answer.json()) as { serverData: Uploaded }).serverData;
  };

  /** A completion that the storage could have sent. */
  const completion = (
    sent: PhotoInput,
    key: string,
    role: Role = "volunteer",
  ): { body: string; signature: string } => {
    const file = `${store.url}/a/${appId}/${key}`;
    const body = JSON.stringify({
      status: "uploaded",
      origin: store.url,
      metadata: { ...sent, personId: desk.people[role] },
      file: {
        key,
        name: "bismar-original",
        size: 1,
        type: "image/jpeg",
        customId: null,
        lastModified: 1,
        url: file,
        appUrl: file,
        ufsUrl: file,
        fileHash: "0",
      },
    });
    return { body, signature: sign(body, apiKey) };
  };
  const callBack = ({ body, signature }: { body: string; signature?: string }) =>
    uploadRoute(
      new Request(`${url}/api/uploadthing?slug=${PHOTO_ROUTE}`, {
        method: "POST",
        body,
        headers: {
          "content-type": "application/json",
          "uploadthing-hook": "callback",
          ...(signature === undefined ? {} : { "x-uploadthing-signature": signature }),
        },
      }),
    );

  const namesIn = (part: "files" | "partial"): string[] =>
    fs.readdirSync(path.join(store.folder, part)).filter((name) => !name.endsWith(".json"));
  const rows = <T>(sql: string, ...values: unknown[]): T[] =>
    desk.db.reader.client.prepare(sql).all(...values) as T[];

  return {
    ...desk,
    appUrl: url,
    apiKey,
    appId,
    environment,
    store,
    storage: storage(),
    cookie: (role: Role) => cookies.get(role) ?? "",
    weighIn,
    lot,
    input,
    ask,
    refusal,
    addressFor,
    put,
    upload,
    completion,
    callBack,
    namesIn,
    rows,
    photoCount: (): number =>
      rows<{ n: number }>("select count(*) as n from photos where removed_at is null")[0]?.n ?? -1,
    /** Drops every photo and file, so that the next test begins with none. */
    async clear(): Promise<void> {
      desk.db.writer.client.prepare("delete from photos").run();
      await store.start();
      await storage().remove((await storage().list()).map(({ key }) => key));
    },
    async close(): Promise<void> {
      await store.stop();
      await new Promise((resolve) => callbacks.close(resolve));
      desk.close();
      fs.rmSync(folder, { recursive: true, force: true });
    },
  };
}

export type PhotoDesk = Awaited<ReturnType<typeof photoDesk>>;

/**
 * A picture of one colour with a darker left half, so that turning it shows.
 *
 */
export async function makePictureFile(
  options: {
    width?: number;
    height?: number;
    format?: "jpeg" | "png" | "webp";
    colour?: { r: number; g: number; b: number };
    /** EXIF orientation, 1 to 8, with a position on the map beside it. */
    orientation?: number;
  } = {},
): Promise<Buffer> {
  const { width = 400, height = 300, format = "jpeg", orientation } = options;
  const colour = options.colour ?? { r: 60, g: 110, b: 190 };
  const left = await sharp({
    create: {
      width: Math.floor(width / 2),
      height,
      channels: 3,
      background: { r: colour.r / 2, g: colour.g / 2, b: colour.b / 2 },
    },
  })
    .png()
    .toBuffer();
  let picture = sharp({ create: { width, height, channels: 3, background: colour } });
  if (orientation !== undefined) {
    picture = picture
      .composite([{ input: left, left: 0, top: 0 }])
      .withMetadata({ orientation })
      .withExifMerge({
        IFD0: { Make: "Phone of a neighbour", ImageDescription: randomUUID() },
        IFD3: { GPSLatitudeRef: "N", GPSLatitude: "51/1 30/1 0/1" },
      });
  }
  return picture.toFormat(format, format === "jpeg" ? { quality: 95 } : {}).toBuffer();
}
