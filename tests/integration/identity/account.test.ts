import { createHash } from "node:crypto";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type SessionId } from "@/lib/core/ids";
import { changePassword, signOutEverywhere } from "@/lib/identity/commands/account";
import { verifyPassword } from "@/lib/identity/commands/scrypt";
import { getAccount } from "@/lib/identity/queries";
import { refusedCode } from "../../support/async-refusal";
import { auditRows, refusalOf } from "../../support/command-cases";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";
import { weakHash } from "../../support/weak-hash";

const OLD = "mudlarks wade slowly";
const NEXT = "tidal flats at dawn";
const email = "volunteer@saltmarsh.example";
const DAY = 24 * 60 * 60 * 1000;

const hash = weakHash(OLD);
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

function session(): SessionId {
  const id = newId<"session">(NOON);
  scheme.db.writer.client
    .prepare("insert into sessions (id, person_id, created_at, expires_at) values (?, ?, ?, ?)")
    .run(id, scheme.people.volunteer, NOON, NOON + DAY);
  return id;
}

describe("changing the own password", () => {
  const input = (present = OLD, password = NEXT, requestId = newId()) => ({
    requestId,
    present,
    password,
  });
  const change = (given: ReturnType<typeof input>, keep: SessionId | null = null) => {
    const ctx = scheme.ctx("volunteer", NOON, given);
    const actor = {
      kind: "person" as const,
      id: scheme.people.volunteer,
      role: "volunteer" as const,
      sessionId: keep,
    };
    return changePassword({ ...ctx, actor }, given);
  };

  it("does it, ends every other session, tells by mail, and leaves one audit row", async () => {
    const [here, there] = [session(), session()];
    expect(await change(input(), here)).toEqual({ sessionsEnded: 1 });
    expect(await verifyPassword(NEXT, storedHash())).toBe(true);
    expect(one("select ended_at from sessions where id = ?", here)).toBeNull();
    expect(one("select ended_at from sessions where id = ?", there)).toBe(NOON);
    expect(one("select subject from outbox where to_address = ?", email)).toContain(
      "password was changed",
    );
    expect(auditRows(scheme)).toEqual([
      { action: "identity.change-password", actor: scheme.people.volunteer },
    ]);
  });

  it("refuses nobody", async () => {
    expect(await refusedCode(changePassword(scheme.ctx("nobody"), input()))).toBe("signed-out");
  });

  it("refuses a wrong present password, and guessing at it", async () => {
    for (let made = 0; made < 5; made += 1) {
      expect(await refusedCode(change(input("not the one")))).toBe("password-wrong");
    }
    expect(await refusedCode(change(input()))).toBe("sign-in-slowed");
    expect(storedHash()).toBe(hash);
    expect(auditRows(scheme)).toEqual([]);
  }, 120_000);

  it("refuses a bad new password", async () => {
    expect(await refusedCode(change(input(OLD, "short")))).toBe("password-too-short");
  });

  it("gives the same answer to the same request again, though the present password is another now", async () => {
    session();
    const given = input();
    expect(await change(given)).toEqual({ sessionsEnded: 1 });
    expect(await change(given)).toEqual({ sessionsEnded: 1 });
    expect(auditRows(scheme)).toHaveLength(1);
  });

  it("keeps no plain hash of a body that held passwords", async () => {
    const given = input();
    await change(given);
    const plain = createHash("sha256").update(JSON.stringify(given)).digest("hex");
    const kept = one("select body_hash from receipts where request_id = ?", given.requestId);
    expect(kept).toMatch(/^[0-9a-f]{64}$/);
    expect(kept).not.toBe(plain);
  });
});

describe("signing out everywhere", () => {
  const everywhere = (
    who: "volunteer" | "lead" | "nobody",
    given = { requestId: newId(NOON) },
    body: unknown = given,
  ) => signOutEverywhere(scheme.ctx(who, NOON, body), given);
  const open = () => one("select count(*) from sessions where ended_at is null");

  it("ends every session of the account, and leaves one audit row", () => {
    session();
    session();
    expect(everywhere("volunteer")).toEqual({ sessionsEnded: 2 });
    expect(open()).toBe(0);
    expect(auditRows(scheme)).toEqual([
      { action: "identity.sign-out-everywhere", actor: scheme.people.volunteer },
    ]);
  });

  it("refuses nobody; every role has an account", () => {
    expect(refusalOf(() => everywhere("nobody"))).toBe("signed-out");
  });

  it("gives the same answer to the same request, and ends nothing that began since", () => {
    session();
    const given = { requestId: newId(NOON) };
    expect(everywhere("volunteer", given)).toEqual({ sessionsEnded: 1 });
    session();
    expect(everywhere("volunteer", given)).toEqual({ sessionsEnded: 1 });
    expect(open()).toBe(1);
    expect(refusalOf(() => everywhere("volunteer", given, "else"))).toBe("request-id-reused");
    expect(refusalOf(() => everywhere("lead", given))).toBe("request-id-reused");
  });

  it("leaves other people's sessions alone", () => {
    session();
    const given = { requestId: newId(NOON) };
    signOutEverywhere(scheme.ctx("lead", NOON, given), given);
    expect(one("select count(*) from sessions where ended_at is null")).toBe(1);
  });
});

describe("the own account", () => {
  it("is the signed-in person's", () => {
    expect(getAccount(scheme.ctx("lead"))).toEqual({
      personId: scheme.people.lead,
      name: "Test lead",
      email: "lead@saltmarsh.example",
      role: "lead",
    });
    expect(refusalOf(() => getAccount(scheme.ctx("nobody")))).toBe("signed-out");
  });
});
