import fs from "node:fs";
import path from "node:path";
import { SMTPServer } from "smtp-server";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { instant } from "@/lib/core/time";
import { deliverDueMail, isMailDue } from "@/lib/mail/commands/deliver";
import { eraseMailIn, queueMailIn } from "@/lib/mail/commands/queue";
import {
  mailTransport,
  type MailTransport,
  type OutgoingMail,
} from "@/lib/mail/commands/transport";
import { findMailState } from "@/lib/mail/queries";
import { inTransaction } from "@/lib/platform/database";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";

const MINUTE = 60_000;
const TO = "brent@saltmarsh.example";
const LINK = "http://localhost:3000/set-password/abcdefghijklmnopqrstuvwxyzabcdefghijklmnopqrs";

let scheme: TestScheme;
beforeEach(() => {
  scheme = newScheme();
});
afterEach(() => scheme.close());

const queue = (to = TO) =>
  inTransaction(scheme, (tx) =>
    queueMailIn(tx, scheme.ctx(), {
      to,
      subject: "Grüße: tide times",
      body: `Dear Brent,\n\n${LINK}\n`,
    }),
  );
const rows = () =>
  scheme.db.reader.client.prepare("select * from outbox order by id").all() as Record<
    string,
    unknown
  >[];
const at = (now: number) => () => instant(now);

/** A fake carrier: takes mail, or refuses as long as it is told to. */
function carrier(): MailTransport & { taken: OutgoingMail[]; broken: boolean } {
  const self = {
    taken: [] as OutgoingMail[],
    broken: false,
    send(mail: OutgoingMail) {
      if (self.broken) return Promise.reject(new Error("421 try later"));
      self.taken.push(mail);
      return Promise.resolve();
    },
  };
  return self;
}

describe("the outbox", () => {
  it("holds a mail only if the transaction that wrote it went through", () => {
    expect(() =>
      inTransaction(scheme, (tx) => {
        queueMailIn(tx, scheme.ctx(), { to: TO, subject: "x", body: "y" });
        throw new Error("the deed failed");
      }),
    ).toThrow("the deed failed");
    expect(rows()).toEqual([]);
  });

  it("empties the body of a mail that went out, and sends it once", async () => {
    queue();
    const post = carrier();
    expect(isMailDue(scheme.db, NOON)).toBe(true);
    expect(await deliverDueMail(scheme.db, post, at(NOON))).toEqual({ sent: 1, failed: 0 });
    expect(post.taken).toMatchObject([{ to: TO, subject: "Grüße: tide times" }]);
    expect(post.taken[0]?.body).toContain(LINK);
    expect(rows()).toMatchObject([{ body: "", sent_at: NOON, attempts: 1 }]);
    expect(isMailDue(scheme.db, NOON)).toBe(false);
    await deliverDueMail(scheme.db, post, at(NOON + MINUTE));
    expect(post.taken).toHaveLength(1);
    expect(findMailState(scheme.db.reader, TO)).toBe("sent");
  });

  it("tries again later, and one that fails does not hold up the others", async () => {
    queue("first@saltmarsh.example");
    queue("second@saltmarsh.example");
    const post = carrier();
    const only: MailTransport = {
      send: (mail) =>
        mail.to.startsWith("first")
          ? Promise.reject(new Error("550 no such box"))
          : post.send(mail),
    };
    expect(await deliverDueMail(scheme.db, only, at(NOON))).toEqual({ sent: 1, failed: 1 });
    expect(rows()[0]).toMatchObject({
      attempts: 1,
      sent_at: null,
      last_error: "550 no such box",
      next_attempt_at: NOON + MINUTE,
    });
    expect(isMailDue(scheme.db, instant(NOON + MINUTE - 1))).toBe(false);
    expect(await deliverDueMail(scheme.db, post, at(NOON + MINUTE))).toEqual({
      sent: 1,
      failed: 0,
    });
    expect(rows()[0]).toMatchObject({ attempts: 2, body: "", last_error: null });
  });

  it("gives up after a day and lets nothing lie about in clear", async () => {
    queue();
    const post = carrier();
    post.broken = true;
    for (let now: number = NOON; now < NOON + 25 * 60 * MINUTE; now += 10 * MINUTE) {
      await deliverDueMail(scheme.db, post, at(now));
    }
    expect(rows()).toMatchObject([{ sent_at: null, body: "", last_error: "421 try later" }]);
    expect(findMailState(scheme.db.reader, TO)).toBe("failed");
    post.broken = false;
    await deliverDueMail(scheme.db, post, at(NOON + 365 * 24 * 60 * MINUTE));
    expect(post.taken).toEqual([]);
  });

  it("forgets an address: waiting mail goes, sent mail loses it", async () => {
    queue();
    await deliverDueMail(scheme.db, carrier(), at(NOON));
    queue();
    inTransaction(scheme, (tx) => eraseMailIn(tx, TO));
    expect(rows()).toMatchObject([{ to_address: "", sent_at: NOON }]);
  });
});

describe("a mail server", () => {
  type Received = { from: string; to: string[]; text: string };

  async function withServer(
    work: (url: string, received: Received[]) => Promise<void>,
    options: { refuse?: boolean; user?: string } = {},
  ): Promise<void> {
    const received: Received[] = [];
    const server = new SMTPServer({
      disabledCommands: options.user ? ["STARTTLS"] : ["AUTH", "STARTTLS"],
      authOptional: !options.user,
      allowInsecureAuth: true,
      onAuth: (auth, _, done) =>
        auth.username === options.user && auth.password === "secret word"
          ? done(null, { user: auth.username })
          : done(new Error("wrong")),
      onRcptTo: (_, __, done) => done(options.refuse ? new Error("no such box") : undefined),
      onData(stream, session, done) {
        const chunks: Buffer[] = [];
        stream.on("data", (chunk: Buffer) => chunks.push(chunk));
        stream.on("end", () => {
          const { mailFrom, rcptTo } = session.envelope;
          received.push({
            from: mailFrom ? mailFrom.address : "",
            to: rcptTo.map(({ address }) => address),
            text: Buffer.concat(chunks).toString("utf8"),
          });
          done();
        });
      },
    });
    await new Promise<void>((ready) => server.listen(0, "127.0.0.1", ready));
    const address = server.server.address();
    const port = typeof address === "object" && address ? address.port : 0;
    const login = options.user ? `${options.user}:secret%20word@` : "";
    try {
      await work(`smtp://${login}127.0.0.1:${port}`, received);
    } finally {
      await new Promise<void>((closed) => server.close(closed));
    }
  }
  const transportTo = (url: string) =>
    mailTransport({
      publicUrl: "https://shed.saltmarsh.example",
      mail: { mode: "smtp", url, from: "Saltmarsh <shed@saltmarsh.example>" },
    });
  /** Undoes quoted-printable, in which long lines are broken. */
  const plain = (text: string) => text.replace(/=\r?\n/g, "").replace(/=3D/g, "=");

  it("gets the mail, with its link whole", async () => {
    queue();
    await withServer(async (url, received) => {
      expect(await deliverDueMail(scheme.db, transportTo(url), at(NOON))).toEqual({
        sent: 1,
        failed: 0,
      });
      expect(received).toMatchObject([{ from: "shed@saltmarsh.example", to: [TO] }]);
      const text = plain(received[0]?.text ?? "");
      expect(text).toContain(LINK);
      expect(text).toMatch(/^Subject: =\?UTF-8\?/m);
      expect(text).toContain(`Message-ID: <outbox-1-${NOON}@shed.saltmarsh.example>`);
    });
    expect(rows()).toMatchObject([{ body: "", sent_at: NOON }]);
  });

  it("that asks for a password gets it from SMTP_URL", async () => {
    queue();
    await withServer(
      async (url, received) => {
        await deliverDueMail(scheme.db, transportTo(url), at(NOON));
        expect(received).toHaveLength(1);
      },
      { user: "shed" },
    );
  });

  it("that refuses leaves the mail waiting", async () => {
    queue();
    await withServer(
      async (url, received) => {
        expect(await deliverDueMail(scheme.db, transportTo(url), at(NOON))).toEqual({
          sent: 0,
          failed: 1,
        });
        expect(received).toEqual([]);
      },
      { refuse: true },
    );
    expect(findMailState(scheme.db.reader, TO)).toBe("waiting");
    expect(rows()[0]?.body).toContain(LINK);
  });

  it("that is not there leaves the mail waiting", async () => {
    queue();
    const result = await deliverDueMail(scheme.db, transportTo("smtp://127.0.0.1:1"), at(NOON));
    expect(result).toEqual({ sent: 0, failed: 1 });
  });
});

describe("the local folder", () => {
  it("gets each mail to read and as data, for this user's eyes only", async () => {
    const folder = fs.mkdtempSync(path.join(path.dirname(scheme.db.file), "mail-"));
    queue();
    const transport = mailTransport({
      publicUrl: "http://localhost:3000",
      mail: { mode: "folder", folder, from: "Bismar <bismar@localhost>" },
    });
    await deliverDueMail(scheme.db, transport, at(NOON));
    expect(fs.readdirSync(folder).sort()).toEqual(["00000001.json", "00000001.txt"]);
    const text = fs.readFileSync(path.join(folder, "00000001.txt"), "utf8");
    expect(text).toContain(`To: ${TO}\n`);
    expect(text).toContain(LINK);
    expect(JSON.parse(fs.readFileSync(path.join(folder, "00000001.json"), "utf8"))).toMatchObject({
      id: 1,
      to: TO,
      subject: "Grüße: tide times",
    });
    expect(fs.statSync(path.join(folder, "00000001.txt")).mode & 0o077).toBe(0);
  });
});
