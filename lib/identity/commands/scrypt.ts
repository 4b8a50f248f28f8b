/**
 * Passwords are kept as scrypt hashes at OWASP's setting (Password Storage Cheat Sheet: N = 2^17, r = 8,
 * p = 1). One takes 128 MiB and a good part of a second, so at most two are worked out at a time.
 */
import "server-only";
import { randomBytes, scrypt, timingSafeEqual } from "node:crypto";
import { AppError } from "@/lib/core/errors";

type Parameters = { log2N: number; r: number; p: number };

const PRESENT: Parameters = { log2N: 17, r: 8, p: 1 };
const KEY_BYTES = 32;
const SALT_BYTES = 16;
/** Node refuses more than 32 MiB unless told; N = 2^17 with r = 8 needs 128 MiB and a little. */
const MAX_MEMORY = 256 * 1024 * 1024;

const MOST_AT_ONCE = 2;
/** Each waits for those before it, so a longer queue would only end in time-outs. */
const MOST_WAITING = 30;

let running = 0;
const waiting: (() => void)[] = [];

async function oneOfTwo<T>(work: () => Promise<T>): Promise<T> {
  if (running >= MOST_AT_ONCE) {
    if (waiting.length >= MOST_WAITING) throw new AppError("sign-in-slowed", { seconds: 10 });
    // The place is handed over by whoever ends, so nobody who comes later can slip in between.
    await new Promise<void>((start) => waiting.push(start));
  } else {
    running += 1;
  }
  try {
    return await work();
  } finally {
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}

function derive(password: string, salt: Buffer, { log2N, r, p }: Parameters): Promise<Buffer> {
  return oneOfTwo(
    () =>
      new Promise<Buffer>((resolve, reject) => {
        scrypt(
          password,
          salt,
          KEY_BYTES,
          { N: 2 ** log2N, r, p, maxmem: MAX_MEMORY },
          (error, key) => (error ? reject(error) : resolve(key)),
        );
      }),
  );
}

/** Base64 without padding, as PHC strings have it. */
const encode = (bytes: Buffer): string => bytes.toString("base64").replace(/=+$/, "");

/**
 * The stored form of a password, with its parameters: `$scrypt$ln=17,r=8,p=1$<salt>$<key>`.
 *
 * @param password in its normal spelling (rules/password.ts)
 */
export async function hashPassword(password: string): Promise<string> {
  const salt = randomBytes(SALT_BYTES);
  const key = await derive(password, salt, PRESENT);
  return `$scrypt$ln=${PRESENT.log2N},r=${PRESENT.r},p=${PRESENT.p}$${encode(salt)}$${encode(key)}`;
}

type Stored = { parameters: Parameters; salt: Buffer; key: Buffer };

function readStored(stored: string): Stored | null {
  const match = /^\$scrypt\$ln=(\d{1,2}),r=(\d{1,2}),p=(\d{1,2})\$([\w+/]+)\$([\w+/]+)$/.exec(
    stored,
  );
  if (!match) return null;
  const parameters = { log2N: Number(match[1]), r: Number(match[2]), p: Number(match[3]) };
  const key = Buffer.from(match[5] ?? "", "base64");
  if (parameters.log2N > PRESENT.log2N || key.byteLength !== KEY_BYTES) return null;
  return { parameters, salt: Buffer.from(match[4] ?? "", "base64"), key };
}

/** Compared against for an account that does not exist, so that the answer takes as long. */
const DUMMY: Stored = {
  parameters: PRESENT,
  salt: randomBytes(SALT_BYTES),
  key: randomBytes(KEY_BYTES),
};

/**
 * Is this the password? Takes the same time for an account that does not exist (stored: null).
 *
 * @param password in its normal spelling
 */
export async function verifyPassword(password: string, stored: string | null): Promise<boolean> {
  const known = stored === null ? null : readStored(stored);
  const { parameters, salt, key } = known ?? DUMMY;
  const same = timingSafeEqual(await derive(password, salt, parameters), key);
  return known !== null && same;
}

/** Was it stored with weaker parameters than today's? Then the next sign-in stores it anew. */
export function isOutdated(stored: string): boolean {
  const known = readStored(stored);
  return known !== null && known.parameters.log2N < PRESENT.log2N;
}
