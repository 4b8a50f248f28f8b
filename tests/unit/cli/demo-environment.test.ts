import { describe, expect, it } from "vitest";
import { demoEnvironment } from "@/lib/cli/demo-environment.mjs";
import { storageEnvironment } from "@/lib/cli/storage-process.mjs";
import { DEMO_SECRET, readSettings } from "@/lib/platform/env";

const demo = {
  port: 3456,
  databaseFile: "/demo/bismar.db",
  storage: storageEnvironment({ port: 3457, folder: "/demo/photos" }),
};

describe("the demo's environment", () => {
  it("is a demo's in the program's own eyes", () => {
    expect(readSettings(demoEnvironment({ ...demo, base: {} }))).toMatchObject({
      mode: "demo",
      databaseFile: "/demo/bismar.db",
      publicUrl: "http://localhost:3456",
      secret: DEMO_SECRET,
      mail: { mode: "folder", folder: "/demo/mail" },
      storage: { mode: "fake", ingestUrl: "http://localhost:3457" },
    });
  });

  it("lets nothing of a production .env through: not its database, mail, secret, address or storage", () => {
    const base = {
      NODE_ENV: "production",
      BISMAR_MODE: "production",
      DATABASE_FILE: "/real/bismar.db",
      PUBLIC_URL: "https://shed.example",
      NEXTAUTH_URL: "https://shed.example",
      NEXTAUTH_SECRET: "a-real-secret-of-more-than-32-characters",
      MAIL_MODE: "smtp",
      SMTP_URL: "smtps://mail.example",
      TRUSTED_PROXY: "1",
      STORAGE_MODE: "hosted",
      UPLOADTHING_TOKEN: "a real token",
      UPLOADTHING_API_URL: "https://storage.example",
      UPLOADTHING_CALLBACK_URL: "https://shed.example/api/uploadthing",
      PATH: "/bin",
    };
    const environment = demoEnvironment({ ...demo, base });
    expect(environment.PATH).toBe("/bin");
    expect(readSettings(environment)).toEqual(readSettings(demoEnvironment({ ...demo, base: {} })));
    for (const [name, value] of Object.entries(base)) {
      if (name !== "PATH" && name !== "NODE_ENV") expect(environment[name], name).not.toBe(value);
    }
  });

  it("has a key of its own for each start", () => {
    const keyOf = () =>
      readSettings(
        demoEnvironment({
          ...demo,
          base: {},
          storage: storageEnvironment({ port: 3457, folder: "/demo/photos" }),
        }),
      ).storage.apiKey;
    expect(keyOf()).toMatch(/^sk_fake_[0-9a-f]{48}$/);
    expect(keyOf()).not.toBe(keyOf());
  });

  it("is refused by a production start", () => {
    const environment = { ...demoEnvironment({ ...demo, base: {} }), BISMAR_MODE: "production" };
    expect(() => readSettings(environment)).toThrow(/NEXTAUTH_SECRET/);
    const secret = "a-real-secret-of-more-than-32-characters";
    expect(() =>
      readSettings({
        ...environment,
        NEXTAUTH_SECRET: secret,
        MAIL_MODE: "smtp",
        SMTP_URL: "smtps://mail.example",
      }),
    ).toThrow(/^STORAGE_MODE/);
  });
});
