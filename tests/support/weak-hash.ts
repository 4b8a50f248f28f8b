/**
 * A stored password that is quick to check, for tests that are not about hashing: the stored form names
 * its own parameters. A right password on it is stored anew at today's, which takes its time.
 */
import { randomBytes, scryptSync } from "node:crypto";

const LOG2N = 4;

export function weakHash(password: string): string {
  const salt = randomBytes(16);
  const key = scryptSync(password, salt, 32, { N: 2 ** LOG2N, r: 8, p: 1 });
  const plain = (bytes: Buffer) => bytes.toString("base64").replace(/=+$/, "");
  return `$scrypt$ln=${LOG2N},r=8,p=1$${plain(salt)}$${plain(key)}`;
}
