/**
 * The files of the stand-in, in one folder: `files/KEY` with `files/KEY.json` beside it. What is being received
 * stands in `partial/` until it is whole, and that folder is emptied at every start.
 */
import { createHash, randomBytes } from "node:crypto";
import fs from "node:fs";
import { open, rename, rm } from "node:fs/promises";
import path from "node:path";
import type { Readable } from "node:stream";

export type FileFacts = {
  name: string;
  type: string;
  size: number;
  customId: string | null;
  acl: "private" | "public-read";
  /** MD5 in hexadecimal, which is what the service calls the file's hash. */
  hash: string;
  uploadedAt: number;
};

export type StoredFile = FileFacts & { key: string };

const KEY = /^[A-Za-z0-9]{20,128}$/;

/** Is it a key? Everything else could be a path. */
export function isKey(text: string): boolean {
  return KEY.test(text);
}

export type Received = { partial: string; size: number; hash: string };

export class Store {
  readonly #files: string;
  readonly #partial: string;

  constructor(folder: string) {
    this.#files = path.join(folder, "files");
    this.#partial = path.join(folder, "partial");
    fs.rmSync(this.#partial, { recursive: true, force: true });
    fs.mkdirSync(this.#partial, { recursive: true });
    fs.mkdirSync(this.#files, { recursive: true });
  }

  #path(key: string): string {
    if (!isKey(key)) throw new Error("not a key");
    return path.join(this.#files, key);
  }

  find(key: string): StoredFile | null {
    if (!isKey(key)) return null;
    try {
      const facts = JSON.parse(fs.readFileSync(`${this.#path(key)}.json`, "utf8")) as FileFacts;
      return { ...facts, key };
    } catch {
      return null;
    }
  }

  read(key: string): fs.ReadStream {
    return fs.createReadStream(this.#path(key));
  }

  list(): StoredFile[] {
    return fs
      .readdirSync(this.#files)
      .filter((name) => name.endsWith(".json"))
      .map((name) => this.find(name.slice(0, -".json".length)))
      .filter((file) => file !== null)
      .sort((one, other) => one.uploadedAt - other.uploadedAt);
  }

  /** @returns was there one? */
  remove(key: string): boolean {
    if (!isKey(key) || !fs.existsSync(this.#path(key))) return false;
    fs.rmSync(`${this.#path(key)}.json`, { force: true });
    fs.rmSync(this.#path(key), { force: true });
    return true;
  }

  /**
   * Writes what comes into a partial file, at most `most` bytes; the rest is counted and let go.
   *
   * @throws whatever ends the stream early; nothing is left of it then
   */
  async receive(key: string, content: Readable, most: number): Promise<Received> {
    const partial = path.join(this.#partial, `${key}.${randomBytes(6).toString("hex")}`);
    const file = await open(partial, "wx", 0o600);
    const hash = createHash("md5");
    let size = 0;
    try {
      for await (const chunk of content as AsyncIterable<Buffer>) {
        size += chunk.length;
        if (size > most) continue;
        hash.update(chunk);
        await file.write(chunk);
      }
      await file.sync();
    } catch (error) {
      await rm(partial, { force: true });
      throw error;
    } finally {
      await file.close();
    }
    return { partial, size, hash: hash.digest("hex") };
  }

  /** Drops what was received. */
  async forget(received: Received): Promise<void> {
    await rm(received.partial, { force: true });
  }

  /** Makes what was received a file; its facts come last, so that what is listed is whole. */
  async keep(key: string, received: Received, facts: FileFacts): Promise<void> {
    const noted = `${received.partial}.json`;
    fs.writeFileSync(noted, JSON.stringify(facts), { mode: 0o600 });
    await rename(received.partial, this.#path(key));
    await rename(noted, `${this.#path(key)}.json`);
  }

  /** How many are being received. */
  countPartial(): number {
    return fs.readdirSync(this.#partial).length;
  }
}
