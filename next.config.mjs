/** @type {import('next').NextConfig} */
const config = {
  typedRoutes: true,
  reactStrictMode: true,
  poweredByHeader: false,
  serverExternalPackages: ["better-sqlite3", "nodemailer"],
  images: { unoptimized: true },
  // `npm run verify` checks types, of the tests too; a build does not do it a second time.
  typescript: { ignoreBuildErrors: true },
  experimental: { authInterrupts: true },
  async rewrites() {
    // The QR on a tag is all capitals (it keeps the symbol small); a redirect here would loop.
    return { beforeFiles: [{ source: "/B/:code", destination: "/b/:code" }] };
  },
};

export default config;
