/**
 * Receiving one file: everything about it is in its signed address, and it is kept only when exactly that
 * arrived. Nothing of a file that broke off, was refused or could not be finished stays.
 */
import type { IncomingMessage, ServerResponse } from "node:http";
import type { Readable } from "node:stream";
import busboy from "busboy";
import { answerJson, drain, Refusal } from "./answers";
import type { Announcement, Announcements } from "./announcements";
import { sign } from "./signature";
import { isKey, type Received, type Store, type StoredFile } from "./store";

const MOST_BYTES = 64 * 1024 * 1024;
/** What a form adds to its one file. */
const FORM_BYTES = 16 * 1024;
const CALLBACK_MS = 120_000;

export type Desk = {
  origin: string;
  apiKey: string;
  appId: string;
  store: Store;
  announcements: Announcements;
  /** Keys that are being received, or were used since the start. */
  taken: Set<string>;
};

/** The one file of a form, as a stream. */
function filePart(request: IncomingMessage): Promise<Readable> {
  return new Promise((resolve, reject) => {
    let form: busboy.Busboy;
    try {
      form = busboy({ headers: request.headers, limits: { files: 1, fields: 0 } });
    } catch {
      reject(new Refusal(400, "no form"));
      return;
    }
    let found: Readable | undefined;
    form.on("file", (name, content) => {
      if (name !== "file") {
        content.resume();
        return;
      }
      found = content;
      resolve(content);
    });
    const broken = (): void => {
      const error = new Refusal(400, "the form broke off");
      found?.destroy(error);
      reject(error);
    };
    form.on("error", broken);
    form.on("close", () => reject(new Refusal(400, "no file in the form")));
    request.once("close", () => {
      if (!request.complete) broken();
    });
    request.pipe(form);
  });
}

type Declared = {
  key: string;
  size: number;
  slug: string | null;
  announcement: Announcement | null;
  parameters: ReadonlyMap<string, string>;
};

/** What the signed address says of the file, checked against what the program announced. */
function readDeclared(
  desk: Desk,
  key: string,
  parameters: ReadonlyMap<string, string>,
  request: IncomingMessage,
): Declared {
  if (!isKey(key)) throw new Refusal(400, "not a key");
  if (parameters.get("x-ut-identifier") !== desk.appId) throw new Refusal(401, "another app's");
  const slug = parameters.get("x-ut-slug") ?? null;
  const announcement = desk.announcements.find(key);
  // The program's own files have no slug and no completion.
  if (slug !== null && announcement?.slug !== slug) throw new Refusal(404, "never announced");
  const size = Number(parameters.get("x-ut-file-size"));
  if (!Number.isSafeInteger(size) || size < 1) throw new Refusal(400, "an empty file");
  const length = Number(request.headers["content-length"] ?? 0);
  if (size > MOST_BYTES || length > size + FORM_BYTES) throw new Refusal(413, "too large");
  if (desk.taken.has(key) || desk.store.find(key)) throw new Refusal(409, "key used");
  return { key, size, slug, announcement: slug === null ? null : announcement, parameters };
}

async function receive(
  desk: Desk,
  declared: Declared,
  request: IncomingMessage,
): Promise<Received> {
  const received = await desk.store.receive(declared.key, await filePart(request), declared.size);
  if (received.size === declared.size) return received;
  await desk.store.forget(received);
  throw new Refusal(received.size > declared.size ? 413 : 400, "not the size that was declared");
}

function tell(
  desk: Desk,
  announcement: Announcement,
  hook: "callback" | "error",
  body: unknown,
): Promise<Response> {
  const text = JSON.stringify(body);
  const url = new URL(announcement.callbackUrl);
  url.searchParams.set("slug", announcement.slug);
  return fetch(url, {
    method: "POST",
    body: text,
    redirect: "error",
    signal: AbortSignal.timeout(CALLBACK_MS),
    headers: {
      "content-type": "application/json",
      "uploadthing-hook": hook,
      "x-uploadthing-signature": sign(text, desk.apiKey),
    },
  });
}

/** What the sender is told of a file. */
function addresses(desk: Desk, file: StoredFile): Record<string, string> {
  const url = `${desk.origin}/a/${desk.appId}/${file.key}`;
  return { url, appUrl: url, ufsUrl: url, fileHash: file.hash };
}

/** @returns what the completion gave, or the reason why there is none */
async function complete(
  desk: Desk,
  announcement: Announcement,
  file: StoredFile,
): Promise<{ serverData: unknown } | { error: string }> {
  const { key, name, size, type, customId } = file;
  const told = { key, name, size, type, customId, lastModified: file.uploadedAt };
  const answer = await tell(desk, announcement, "callback", {
    status: "uploaded",
    origin: desk.origin,
    metadata: announcement.metadata,
    file: { ...told, ...addresses(desk, file) },
  }).catch(() => null);
  await answer?.body?.cancel();
  const serverData = desk.announcements.takeResult(key);
  if (!answer) return { error: "the completion could not be called" };
  if (!answer.ok) return { error: `the completion answered ${answer.status}` };
  return serverData === undefined ? { error: "the completion gave nothing" } : { serverData };
}

/** PUT of a signed address whose signature was checked. */
export async function takeUpload(
  desk: Desk,
  key: string,
  parameters: ReadonlyMap<string, string>,
  request: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  const declared = readDeclared(desk, key, parameters, request);
  desk.taken.add(key);
  let received: Received;
  try {
    received = await receive(desk, declared, request);
  } catch (error) {
    // The same address may be used for another try until it runs out.
    desk.taken.delete(key);
    await drain(request);
    if (declared.announcement) {
      const reason = error instanceof Error ? error.message : "failed";
      await tell(desk, declared.announcement, "error", { fileKey: key, error: reason })
        .then((answer) => answer.body?.cancel())
        .catch(() => undefined);
    }
    throw error instanceof Refusal ? error : new Refusal(400, "broke off");
  }
  await desk.store.keep(key, received, {
    name: parameters.get("x-ut-file-name") ?? "file",
    type: parameters.get("x-ut-file-type") ?? "application/octet-stream",
    size: received.size,
    customId: parameters.get("x-ut-custom-id") ?? null,
    acl: parameters.get("x-ut-acl") === "public-read" ? "public-read" : "private",
    hash: received.hash,
    uploadedAt: Date.now(),
  });
  const file = desk.store.find(key);
  if (!file) throw new Error(`${key} was kept and is not there`);
  const told = addresses(desk, file);
  if (!declared.announcement) {
    answerJson(response, 200, told);
    return;
  }
  const completed = await complete(desk, declared.announcement, file);
  if ("error" in completed) desk.store.remove(key);
  answerJson(response, 200, { ...told, ...completed });
}
