import { describe, expect, it } from "vitest";
import type * as z from "zod";
import { newId, type PersonId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import {
  changeRole,
  invitePerson,
  removePerson,
  resendInvite,
} from "@/lib/identity/commands/people";
import type { changeRoleEndpoint } from "@/lib/identity/contract";
import { listPeople } from "@/lib/identity/queries";
import { auditRows, commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";

const NEW = { name: "Brent Knot", email: "brent@saltmarsh.example", role: "volunteer" as Role };

const all = (scheme: TestScheme, sql: string, ...values: unknown[]) =>
  scheme.db.reader.client.prepare(sql).all(...values) as Record<string, unknown>[];

/** Invites and gives back the person's id. */
function invited(scheme: TestScheme, person = NEW): PersonId {
  const input = { requestId: newId(NOON), ...person };
  return invitePerson(scheme.ctx("coordinator", NOON, input), input).personId;
}

describe("invitePerson", () => {
  commandCases({
    command: invitePerson,
    by: "coordinator",
    notBy: "lead",
    action: "people.invite",
    input: () => ({ requestId: newId(NOON), ...NEW }),
    does: (scheme, { personId }, input) => {
      expect(personId).toBe(input.requestId);
      expect(listPeople(scheme.ctx()).people).toContainEqual({
        id: personId,
        ...NEW,
        state: "invited",
        invitedAt: NOON,
        inviteMail: "waiting",
      });
      const [mail] = all(scheme, "select to_address, subject, body from outbox");
      expect(mail).toMatchObject({
        to_address: NEW.email,
        subject: "Saltmarsh Plastics Shed: you are invited",
      });
      const token = /http:\/\/localhost:3000\/set-password\/([\w-]{43})\n/.exec(
        String(mail?.body),
      )?.[1];
      expect(token).toBeDefined();
      // The token itself is nowhere but in the mail.
      const links = all(
        scheme,
        "select token_hash, person_id, purpose, expires_at from account_links",
      );
      expect(links).toMatchObject([
        { person_id: personId, purpose: "invite", expires_at: NOON + 86_400_000 },
      ]);
      expect(links[0]?.token_hash).not.toBe(token);
    },
    wrongState: (scheme) => ({
      input: { requestId: newId(NOON), ...NEW, email: "lead@saltmarsh.example" },
      code: (expect(scheme.people.lead).toBeDefined(), "email-in-use"),
    }),
  });

  it("keeps name and address out of the audit row proper, and out of receipts", () => {
    const scheme = newScheme();
    invited(scheme);
    const rows = JSON.stringify(all(scheme, "select * from audit_events"));
    const receipts = JSON.stringify(all(scheme, "select * from receipts"));
    for (const personal of [NEW.name, NEW.email]) {
      expect(rows).not.toContain(personal);
      expect(receipts).not.toContain(personal);
    }
    expect(all(scheme, "select field, value from audit_values order by field")).toEqual([
      { field: "email", value: NEW.email },
      { field: "name", value: NEW.name },
    ]);
    scheme.close();
  });
});

describe("resendInvite", () => {
  commandCases({
    command: resendInvite,
    by: "coordinator",
    notBy: "volunteer",
    action: "people.resend-invite",
    input: (scheme) => ({ requestId: newId(NOON), personId: invited(scheme) }),
    does: (scheme, { personId }) => {
      const live = all(
        scheme,
        "select token_hash from account_links where person_id = ? and expires_at > ?",
        personId,
        NOON,
      );
      expect(live).toHaveLength(1);
      expect(all(scheme, "select id from outbox where to_address = ?", NEW.email)).toHaveLength(2);
    },
    wrongState: (scheme) => ({
      input: { requestId: newId(NOON), personId: scheme.people.lead },
      code: "joined-already",
    }),
  });
});

describe("changeRole", () => {
  commandCases({
    command: changeRole,
    by: "coordinator",
    notBy: "lead",
    action: "people.change-role",
    input: (scheme): z.output<typeof changeRoleEndpoint.input> => ({
      requestId: newId(NOON),
      personId: scheme.people.volunteer,
      role: "lead",
    }),
    does: (scheme) => {
      const changed = listPeople(scheme.ctx()).people.find(
        ({ id }) => id === scheme.people.volunteer,
      );
      expect(changed?.role).toBe("lead");
    },
    wrongState: (scheme) => ({
      input: {
        requestId: newId(NOON),
        personId: scheme.people.coordinator,
        role: "lead" as const,
      },
      code: "own-role",
    }),
  });
});

describe("removePerson", () => {
  commandCases({
    command: removePerson,
    by: "coordinator",
    notBy: "lead",
    action: "people.remove",
    input: (scheme) => {
      scheme.db.writer.client
        .prepare("insert into sessions (id, person_id, created_at, expires_at) values (?, ?, ?, ?)")
        .run(newId(NOON), scheme.people.lead, NOON, NOON + 1000);
      return { requestId: newId(NOON), personId: scheme.people.lead };
    },
    does: (scheme, { personId, sessionsEnded }) => {
      expect(sessionsEnded).toBe(1);
      expect(all(scheme, "select 1 from sessions where ended_at is null")).toEqual([]);
      expect(all(scheme, "select * from people where id = ?", personId)).toMatchObject([
        { name: "Test lead", email: null, password_hash: null, removed_at: NOON },
      ]);
      expect(listPeople(scheme.ctx()).people.map(({ id }) => id)).not.toContain(personId);
    },
    wrongState: () => ({
      input: { requestId: newId(NOON), personId: newId<"person">() },
      code: "not-found",
    }),
  });

  it("forgets what was kept of the person beside the row: mail, audit values, links", () => {
    const scheme = newScheme();
    const personId = invited(scheme);
    const input = { requestId: newId(NOON), personId };
    removePerson(scheme.ctx("coordinator", NOON, input), input);
    expect(all(scheme, "select * from outbox")).toEqual([]);
    expect(all(scheme, "select value from audit_values")).toEqual([
      { value: null },
      { value: null },
    ]);
    expect(all(scheme, "select 1 from account_links where expires_at > ?", NOON)).toEqual([]);
    expect(JSON.stringify(all(scheme, "select * from people"))).not.toContain(NEW.email);
    // The address is free again, for a new invitation.
    expect(invited(scheme)).not.toBe(personId);
    scheme.close();
  });

  it("leaves one coordinator even when two remove each other in the same moment", () => {
    const scheme = newScheme();
    const second = newId<"person">(NOON);
    scheme.db.writer.client
      .prepare(
        "insert into people (id, name, email, role, invited_at, joined_at) values (?, 'Second', 's@saltmarsh.example', 'coordinator', ?, ?)",
      )
      .run(second, NOON, NOON);
    const asSecond = {
      ...scheme.ctx("coordinator", NOON, "second"),
      actor: { kind: "person" as const, id: second, role: "coordinator" as const, sessionId: null },
    };
    const removal = (personId: PersonId) => ({ requestId: newId(NOON), personId });
    removePerson(scheme.ctx(), removal(second));
    // Its context was made before its own removal.
    expect(refusalOf(() => removePerson(asSecond, removal(scheme.people.coordinator)))).toBe(
      "last-coordinator",
    );
    expect(auditRows(scheme)).toHaveLength(1);
    scheme.close();
  });

  it("does not count a coordinator who never joined", () => {
    const scheme = newScheme();
    invited(scheme, { ...NEW, role: "coordinator" });
    const input = { requestId: newId(NOON), personId: scheme.people.coordinator };
    expect(refusalOf(() => removePerson(scheme.ctx("system", NOON, input), input))).toBe(
      "last-coordinator",
    );
    scheme.close();
  });
});

describe("listPeople", () => {
  it("is for coordinators", () => {
    const scheme = newScheme();
    expect(refusalOf(() => listPeople(scheme.ctx("lead")))).toBe("forbidden");
    expect(refusalOf(() => listPeople(scheme.ctx("nobody")))).toBe("signed-out");
    expect(listPeople(scheme.ctx()).people).toHaveLength(4);
    scheme.close();
  });
});
