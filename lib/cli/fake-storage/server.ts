/**
 * The stand-in for the picture storage: the part of the hosted service's protocol that the program and its
 * pages use, so that both meet the same checks, refusals and cross-origin rules as with the real one.
 */
import http, { type IncomingMessage, type ServerResponse } from "node:http";
import { pipeline } from "node:stream/promises";
import { answerJson, drain, readJsonObject, Refusal } from "./answers";
import { Announcements } from "./announcements";
import { answerMachineCall, isMachineCall } from "./machine-calls";
import { isSame, readSigned } from "./signature";
import { Store } from "./store";
import { takeUpload, type Desk } from "./upload";

export type FakeStorageSettings = {
  /** http://localhost:PORT */
  origin: string;
  apiKey: string;
  appId: string;
  folder: string;
  /** The program's origin: its pages may send files, and its completion is called. */
  appOrigin: string;
};

const CORS = {
  "access-control-allow-methods": "HEAD, PUT",
  "access-control-allow-headers": "range, x-uploadthing-version, b3, traceparent, content-type",
  "access-control-expose-headers": "x-ut-range-start",
  "access-control-max-age": "600",
  vary: "origin",
} as const;

function signedParameters(desk: Desk, target: string): ReadonlyMap<string, string> {
  const read = readSigned(desk.origin, target, desk.apiKey, Date.now());
  if (!read.ok) throw new Refusal(read.status, read.reason);
  return read.parameters;
}

/** GET and HEAD of a kept file. */
async function serveFile(
  desk: Desk,
  key: string,
  target: string,
  request: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  const file = desk.store.find(key);
  if (file?.acl !== "public-read") signedParameters(desk, target);
  if (!file) throw new Refusal(404, "no such file");
  response.writeHead(200, {
    "content-type": file.type,
    "content-length": file.size,
    "content-disposition": `inline; filename*=UTF-8''${encodeURIComponent(file.name)}`,
    "content-security-policy": "sandbox; default-src 'none'",
    "x-content-type-options": "nosniff",
    "cache-control": "private, no-store",
  });
  if (request.method === "HEAD") response.end();
  else await pipeline(desk.store.read(key), response);
}

async function answer(
  desk: Desk,
  settings: FakeStorageSettings,
  request: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  const target = request.url ?? "/";
  const path = target.split("?", 1)[0] ?? "/";
  const { method } = request;
  if (request.headers.origin === settings.appOrigin) {
    response.setHeader("access-control-allow-origin", settings.appOrigin);
    for (const [name, value] of Object.entries(CORS)) response.setHeader(name, value);
  }
  if (method === "OPTIONS") {
    response.writeHead(204).end();
  } else if (method === "GET" && path === "/health") {
    answerJson(response, 200, { status: "ok" });
  } else if (method === "POST" && isMachineCall(path)) {
    const key = request.headers["x-uploadthing-api-key"];
    if (typeof key !== "string" || !isSame(key, desk.apiKey)) throw new Refusal(401, "wrong key");
    const body = await readJsonObject(request);
    const callbacks = `${settings.appOrigin}/api/uploadthing`;
    answerJson(response, 200, answerMachineCall(desk, path, body, callbacks));
  } else if ((method === "GET" || method === "HEAD") && path.startsWith(`/a/${desk.appId}/`)) {
    await serveFile(desk, path.slice(`/a/${desk.appId}/`.length), target, request, response);
  } else if (method === "HEAD") {
    signedParameters(desk, target);
    // Nothing of a broken file stays, so every try begins at the first byte.
    response.writeHead(200, { "x-ut-range-start": "0" }).end();
  } else if (method === "PUT") {
    await takeUpload(desk, path.slice(1), signedParameters(desk, target), request, response);
  } else throw new Refusal(404, "nothing here");
}

/**
 * Makes the server; it listens on nothing yet.
 *
 * @param settings checked by who calls this
 */
export function makeFakeStorage(settings: FakeStorageSettings): http.Server {
  const desk: Desk = {
    origin: settings.origin,
    apiKey: settings.apiKey,
    appId: settings.appId,
    store: new Store(settings.folder),
    announcements: new Announcements(),
    taken: new Set(),
  };
  return http.createServer((request, response) => {
    // A sender that goes away in the middle is no failure of the stand-in.
    request.on("error", () => undefined);
    response.on("error", () => undefined);
    answer(desk, settings, request, response).catch(async (error: unknown) => {
      await drain(request);
      if (error instanceof Refusal) {
        answerJson(response, error.status, { message: error.message });
        return;
      }
      if (!request.destroyed) console.error(error);
      answerJson(response, 500, { message: "the stand-in failed" });
    });
  });
}
