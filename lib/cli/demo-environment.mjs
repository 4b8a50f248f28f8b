/**
 * The settings of the demo. Every variable is set here, so that a production .env in the same folder
 * cannot make the demo write to the real database or send real mail.
 */

/**
 * @param {{ port: number, databaseFile: string, storage: Readonly<Record<string, string>>, base: Readonly<Record<string, string | undefined>> }} demo
 *   storage: what storageEnvironment() of storage-process.mjs made
 * @returns {Record<string, string | undefined>} the environment of everything that the demo starts
 */
export function demoEnvironment({ port, databaseFile, storage, base }) {
  const url = `http://localhost:${port}`;
  return {
    ...base,
    NODE_ENV: "production",
    NEXT_TELEMETRY_DISABLED: "1",
    BISMAR_MODE: "demo",
    DATABASE_FILE: databaseFile,
    PORT: String(port),
    PUBLIC_URL: url,
    NEXTAUTH_URL: url,
    // The demo's well-known secret of lib/platform/env.ts, which a production start refuses.
    NEXTAUTH_SECRET: "demo-secret-not-for-production-0000",
    MAIL_MODE: "folder",
    SMTP_URL: "",
    TRUSTED_PROXY: "0",
    ...storage,
  };
}
