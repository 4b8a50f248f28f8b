import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { requestPasswordReset, setPassword } from "@/lib/identity/commands/account";
import { setUpPeopleIn } from "@/lib/identity/commands/add-people";
import { invitePerson } from "@/lib/identity/commands/people";
import { verifyPassword } from "@/lib/identity/commands/scrypt";
import { findLink } from "@/lib/identity/queries";
import { inTransaction } from "@/lib/platform/database";
import { refusedCode } from "../../support/async-refusal";
import { auditRows } from "../../support/command-cases";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";
import { weakHash } from "../../support/weak-hash";

const NEXT = "tidal flats at dawn";
const email = "volunteer@saltmarsh.example";
const DAY = 24 * 60 * 60 * 1000;

const hash = weakHash("mudlarks wade slowly");
let scheme: TestScheme;
beforeEach(() => {
  scheme = newScheme();
  scheme.db.writer.client.prepare("update people set password_hash = ?").run(hash);
});
afterEach(() => scheme.close());

const one = (sql: string, ...values: unknown[]) =>
  scheme.db.reader.client
    .prepare(sql)
    .pluck()
    .get(...values);
const storedHash = () => one("select password_hash from people where email = ?", email) as string;

function session(): void {
  scheme.db.writer.client
    .prepare("insert into sessions (id, person_id, created_at, expires_at) values (?, ?, ?, ?)")
    .run(newId<"session">(NOON), scheme.people.volunteer, NOON, NOON + DAY);
}

/** The token of the newest mail. */
function mailedToken(): string {
  const body = one("select body from outbox order by id desc limit 1") as string;
  const token = /\/set-password\/([\w-]{43})$/m.exec(body)?.[1];
  if (!token) throw new Error(`no link in: ${body}`);
  return token;
}

const ask = (address = email, now = NOON) =>
  requestPasswordReset(scheme.ctx("nobody", now), { requestId: newId(), email: address });
const setting = (token: string, password = NEXT, requestId = newId()) => ({
  requestId,
  token,
  password,
});
const setAs = (input: ReturnType<typeof setting>, now = NOON) =>
  setPassword(scheme.ctx("nobody", now, input), input);

describe("a forgotten password", () => {
  it("mails a link to whoever is here", async () => {
    expect(await ask()).toEqual({ accepted: true });
    expect(findLink(scheme.db.reader, mailedToken(), NOON)).toMatchObject({
      personId: scheme.people.volunteer,
      purpose: "reset",
    });
    expect(auditRows(scheme)).toEqual([{ action: "identity.ask-reset", actor: null }]);
  });

  it("answers the same, after the same time, to an address that nobody has", async () => {
    const timed = async (address: string) => {
      const started = performance.now();
      expect(await ask(address)).toEqual({ accepted: true });
      return performance.now() - started;
    };
    const known = Math.min(await timed(email), await timed(email));
    const unknown = Math.min(
      await timed("x@saltmarsh.example"),
      await timed("y@saltmarsh.example"),
    );
    expect(Math.min(known, unknown)).toBeGreaterThan(240);
    expect(Math.abs(known - unknown)).toBeLessThan(60);
    expect(one("select count(*) from outbox where to_address <> ?", email)).toBe(0);
  });

  it("is slowed after three in an hour, for both alike", async () => {
    for (const address of [email, "x@saltmarsh.example"]) {
      for (let asked = 0; asked < 3; asked += 1) await ask(address);
      expect(await refusedCode(ask(address))).toBe("sign-in-slowed");
    }
    expect(one("select count(*) from outbox")).toBe(3);
    expect(await ask(email, instant(NOON + 60 * 60 * 1000))).toEqual({ accepted: true });
  });

  it("is not answered for a removed person", async () => {
    scheme.db.writer.client.prepare("update people set removed_at = 1 where email = ?").run(email);
    expect(await ask()).toEqual({ accepted: true });
    expect(one("select count(*) from outbox")).toBe(0);
  });
});

describe("a mailed link", () => {
  it("sets a password once, ends open sessions, and leaves one audit row", async () => {
    await ask();
    const token = mailedToken();
    session();
    expect(await setAs(setting(token))).toEqual({ done: true });
    expect(await verifyPassword(NEXT, storedHash())).toBe(true);
    expect(one("select count(*) from sessions where ended_at is null")).toBe(0);
    expect(await refusedCode(setAs(setting(token, "another good one")))).toBe("link-expired");
    expect(await verifyPassword(NEXT, storedHash())).toBe(true);
    expect(auditRows(scheme).map(({ action }) => action)).toEqual([
      "identity.ask-reset",
      "identity.set-password",
    ]);
  });

  it("gives the same answer to the same request again", async () => {
    await ask();
    const input = setting(mailedToken());
    await setAs(input);
    const before = storedHash();
    expect(await setAs(input)).toEqual({ done: true });
    expect(storedHash()).toBe(before);
    const other = setPassword(scheme.ctx("nobody", NOON, "else"), input);
    expect(await refusedCode(other)).toBe("request-id-reused");
  });

  it("works for a day and no longer", async () => {
    await ask();
    const token = mailedToken();
    expect(findLink(scheme.db.reader, token, instant(NOON + DAY - 1))).not.toBeNull();
    expect(await refusedCode(setAs(setting(token), instant(NOON + DAY)))).toBe("link-expired");
    expect(storedHash()).toBe(hash);
  });

  it("stops working when a newer one is made", async () => {
    await ask();
    const first = mailedToken();
    await ask();
    expect(await refusedCode(setAs(setting(first)))).toBe("link-expired");
    expect(await setAs(setting(mailedToken()))).toEqual({ done: true });
  });

  it("is not used up by a password that is refused", async () => {
    await ask();
    const token = mailedToken();
    expect(await refusedCode(setAs(setting(token, "short")))).toBe("password-too-short");
    expect(await refusedCode(setAs(setting(token, "x1 ".repeat(70))))).toBe("password-too-long");
    expect(await refusedCode(setAs(setting(token, "Password2026")))).toBe("password-too-common");
    expect(await refusedCode(setAs(setting(token, "Test volunteer")))).toBe("password-too-common");
    expect(await setAs(setting(token))).toEqual({ done: true });
  });

  it("is refused when it was never made", async () => {
    expect(await refusedCode(setAs(setting("A".repeat(43))))).toBe("link-expired");
  });

  it("of an invitation lets the person join", async () => {
    const input = {
      requestId: newId(NOON),
      name: "Brent",
      email: "b@saltmarsh.example",
      role: "lead" as const,
    };
    const { personId } = invitePerson(scheme.ctx("coordinator", NOON, input), input);
    expect(one("select joined_at from people where id = ?", personId)).toBeNull();
    await setAs(setting(mailedToken()), instant(NOON + 5));
    expect(one("select joined_at from people where id = ?", personId)).toBe(NOON + 5);
  });

  it("made at the command line is the first coordinator's", async () => {
    const { personId, link } = inTransaction(scheme, (tx) =>
      setUpPeopleIn(tx, scheme.ctx("system"), { name: "First", email: "First@Saltmarsh.example" }),
    );
    const token = link.slice("http://localhost:3000/set-password/".length);
    expect(findLink(scheme.db.reader, token, NOON)).toMatchObject({
      personId,
      email: "first@saltmarsh.example",
    });
    await setAs(setting(token));
    expect(one("select role from people where id = ?", personId)).toBe("coordinator");
  });
});
