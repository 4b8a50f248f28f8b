/**
 * The scanner's worker alone may compile WebAssembly: a worker obeys the policy of its own answer, so no page
 * has to allow it. It loads nothing but the WebAssembly beside it.
 */
export const SCANNER_HEADERS = [
  {
    key: "content-security-policy",
    value:
      "default-src 'none'; script-src 'self' 'wasm-unsafe-eval'; connect-src 'self'; frame-ancestors 'none'",
  },
  { key: "x-content-type-options", value: "nosniff" },
  { key: "referrer-policy", value: "same-origin" },
  { key: "cross-origin-resource-policy", value: "same-origin" },
];

/** @type {import('next').NextConfig} */
const config = {
  typedRoutes: true,
  reactStrictMode: true,
  poweredByHeader: false,
  serverExternalPackages: ["better-sqlite3", "nodemailer"],
  images: { unoptimized: true },
  // `npm run verify` checks types, of the tests too; a build does not do it a second time.
  typescript: { ignoreBuildErrors: true },
  experimental: {
    authInterrupts: true,
    // Smaller chunks than this (bytes before packing; the default is 50 000) are merged: pages grow by no code that they
    // do not use, pack better, and ask for fewer files. It is what keeps the weigh-in page within its 50 KiB.
    turbopackChunking: { minChunkSize: 120_000 },
  },
  async headers() {
    return [{ source: "/scanner/:file*", headers: SCANNER_HEADERS }];
  },
  async rewrites() {
    // The QR on a tag is all capitals (it keeps the symbol small); a redirect here would loop.
    return { beforeFiles: [{ source: "/B/:code", destination: "/b/:code" }] };
  },
};

export default config;
