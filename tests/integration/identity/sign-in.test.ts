import { afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { instant } from "@/lib/core/time";
import { hashPassword, isOutdated, verifyPassword } from "@/lib/identity/commands/scrypt";
import { signIn, signOut } from "@/lib/identity/commands/sign-in";
import { findSessionRole } from "@/lib/identity/queries";
import { refusedCode, refusedError } from "../../support/async-refusal";
import { auditRows } from "../../support/command-cases";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";
import { weakHash } from "../../support/weak-hash";

const PASSWORD = "mudlarks wade slowly";
const email = "volunteer@saltmarsh.example";
const DAY = 24 * 60 * 60 * 1000;

let hash: string;
let scheme: TestScheme;
beforeAll(async () => {
  hash = await hashPassword(PASSWORD);
});
beforeEach(() => {
  scheme = newScheme();
  storeHash(weakHash(PASSWORD));
});
afterEach(() => scheme.close());

/** Everybody's but the donor's, who was invited and has not joined. */
function storeHash(stored: string): void {
  scheme.db.writer.client
    .prepare("update people set password_hash = ? where role <> 'donor'")
    .run(stored);
}

const nobody = (now = NOON, address: string | null = null) => ({
  ...scheme.ctx("nobody", now),
  address,
});
const wrong = (now = NOON, address: string | null = null) =>
  refusedError(signIn(nobody(now, address), { email, password: "not the password" }));

describe("a stored password", () => {
  it("names scrypt at N = 2^17, r = 8, p = 1, with a salt of its own", async () => {
    expect(hash).toMatch(/^\$scrypt\$ln=17,r=8,p=1\$[\w+/]{22}\$[\w+/]{43}$/);
    expect(await hashPassword(PASSWORD)).not.toBe(hash);
  });

  it("is recognised, and no other", async () => {
    expect(await verifyPassword(PASSWORD, hash)).toBe(true);
    expect(await verifyPassword(`${PASSWORD} `, hash)).toBe(false);
    expect(await verifyPassword(PASSWORD, null)).toBe(false);
    expect(await verifyPassword("", "not a hash")).toBe(false);
  });

  /** RFC 7914, section 12: scrypt("pleaseletmein", "SodiumChloride", N=16384, r=8, p=1), first 32 bytes. */
  it("agrees with the published test vector", async () => {
    const key = "7023bdcb3afd7348461c06cd81fd38ebfda8fbba904f8e3ea9b543f6545da1f2";
    const plain = (bytes: Buffer) => bytes.toString("base64").replace(/=+$/, "");
    const salt = plain(Buffer.from("SodiumChloride"));
    const stored = `$scrypt$ln=14,r=8,p=1$${salt}$${plain(Buffer.from(key, "hex"))}`;
    expect(await verifyPassword("pleaseletmein", stored)).toBe(true);
    expect(await verifyPassword("pleaseletmeinn", stored)).toBe(false);
    expect(isOutdated(stored)).toBe(true);
    expect(isOutdated(hash)).toBe(false);
  });
});

describe("signing in", () => {
  it("begins a session that ends thirty days later, and leaves one audit row", async () => {
    const { personId, sessionId } = await signIn(nobody(), { email, password: PASSWORD });
    expect(personId).toBe(scheme.people.volunteer);
    const roleAt = (at: number) =>
      findSessionRole(scheme.db.reader, sessionId, personId, instant(at));
    expect(roleAt(NOON + 30 * DAY - 1)).toBe("volunteer");
    expect(roleAt(NOON + 30 * DAY)).toBeNull();
    expect(auditRows(scheme)).toEqual([{ action: "identity.sign-in", actor: null }]);
  });

  it("begins another session each time", async () => {
    const first = await signIn(nobody(), { email, password: PASSWORD });
    const second = await signIn(nobody(), { email, password: PASSWORD });
    expect(second.sessionId).not.toBe(first.sessionId);
  });

  it("says the same to a wrong password, an unknown, a removed and an invited person", async () => {
    scheme.db.writer.client.prepare("update people set removed_at = 1 where role = 'lead'").run();
    const tries: [string, string][] = [
      [email, "not the password"],
      ["nobody-here@saltmarsh.example", PASSWORD],
      ["lead@saltmarsh.example", PASSWORD],
      ["donor@saltmarsh.example", PASSWORD],
      [email, ""],
    ];
    for (const [address, password] of tries) {
      const refusal = await refusedError(signIn(nobody(), { email: address, password }));
      expect([refusal.code, refusal.detail]).toEqual(["wrong-sign-in", {}]);
    }
    expect(scheme.db.reader.client.prepare("select count(*) from sessions").pluck().get()).toBe(0);
  });

  it("takes as long for an account that does not exist", async () => {
    storeHash(hash);
    const timed = async (address: string) => {
      const started = performance.now();
      await refusedCode(signIn(nobody(), { email: address, password: "not the password" }));
      return performance.now() - started;
    };
    // The least of several: other work on the machine only ever adds.
    const known = Math.min(await timed(email), await timed(email), await timed(email));
    const unknown = Math.min(
      await timed("a@saltmarsh.example"),
      await timed("b@saltmarsh.example"),
      await timed("c@saltmarsh.example"),
    );
    expect(unknown).toBeGreaterThan(known / 2);
    expect(unknown).toBeLessThan(known * 2);
  });

  it("stores an old hash anew with today's parameters", async () => {
    await signIn(nobody(), { email, password: PASSWORD });
    const now = scheme.db.reader.client
      .prepare("select password_hash from people where email = ?")
      .pluck()
      .get(email) as string;
    expect(now).toMatch(/^\$scrypt\$ln=17,/);
    expect(await verifyPassword(PASSWORD, now)).toBe(true);
  });
});

describe("slowing", () => {
  it("lets five wrong tries pass, then asks to wait, whether the account exists or not", async () => {
    for (const address of [email, "nobody-here@saltmarsh.example"]) {
      const tryOnce = (password: string) =>
        refusedError(signIn(nobody(), { email: address, password }));
      for (let made = 0; made < 5; made += 1)
        expect((await tryOnce("x")).code).toBe("wrong-sign-in");
      const refusal = await tryOnce(PASSWORD);
      expect([refusal.code, refusal.detail]).toEqual(["sign-in-slowed", { seconds: 10 }]);
    }
  }, 120_000);

  it("takes the right password again after the wait, and forgets the tries", async () => {
    for (let made = 0; made < 5; made += 1) await wrong();
    const later = instant(NOON + 10_000);
    await signIn(nobody(later), { email, password: PASSWORD });
    expect((await wrong(later)).code).toBe("wrong-sign-in");
  }, 120_000);

  it("counts tries that are made at the same time", async () => {
    const codes = await Promise.all(
      Array.from({ length: 12 }, () => wrong().then(({ code }) => code)),
    );
    expect(codes.filter((code) => code === "wrong-sign-in")).toHaveLength(5);
    expect(codes.filter((code) => code === "sign-in-slowed")).toHaveLength(7);
  }, 120_000);

  it("counts an address over accounts, and names neither in the table", async () => {
    scheme.db.writer.client
      .prepare("update people set email = 'other@saltmarsh.example' where role = 'lead'")
      .run();
    await wrong(NOON, "203.0.113.9");
    const rows = scheme.db.reader.client
      .prepare("select key, failures from sign_in_failures")
      .all();
    expect(rows).toHaveLength(3);
    expect(JSON.stringify(rows)).not.toMatch(/saltmarsh|203/);
    scheme.db.writer.client
      .prepare("update sign_in_failures set failures = 30, blocked_until = ? where key <> 'global'")
      .run(NOON + 5000);
    const elsewhere = { email: "other@saltmarsh.example", password: PASSWORD };
    const slowed = await refusedError(signIn(nobody(NOON, "203.0.113.9"), elsewhere));
    expect([slowed.code, slowed.detail]).toEqual(["sign-in-slowed", { seconds: 5 }]);
    expect(await signIn(nobody(NOON, "198.51.100.7"), elsewhere)).toBeDefined();
  });

  it("never locks everybody out: with failures all over, the right password still works", async () => {
    scheme.db.writer.client
      .prepare(
        "insert into sign_in_failures (key, failures, last_at, blocked_until) values ('global', 100000, ?, ?)",
      )
      .run(NOON, NOON);
    const started = performance.now();
    expect(await signIn(nobody(), { email, password: PASSWORD })).toBeDefined();
    expect(performance.now() - started).toBeGreaterThan(2900);
  });
});

describe("signing out", () => {
  it("ends this session and no other, and once", async () => {
    const here = await signIn(nobody(), { email, password: PASSWORD });
    const there = await signIn(nobody(), { email, password: PASSWORD });
    signOut(nobody(), here);
    signOut(nobody(), here);
    const alive = ({ sessionId, personId }: typeof here) =>
      findSessionRole(scheme.db.reader, sessionId, personId, NOON) !== null;
    expect([alive(here), alive(there)]).toEqual([false, true]);
    expect(auditRows(scheme).filter(({ action }) => action === "identity.sign-out")).toHaveLength(
      1,
    );
  });

  it("does not end a session with another person's id", async () => {
    const mine = await signIn(nobody(), { email, password: PASSWORD });
    signOut(nobody(), { sessionId: mine.sessionId, personId: scheme.people.lead });
    expect(findSessionRole(scheme.db.reader, mine.sessionId, mine.personId, NOON)).toBe(
      "volunteer",
    );
  });
});
