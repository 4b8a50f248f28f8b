import type { Metadata, Viewport } from "next";
import { headers } from "next/headers";
import type { ReactNode } from "react";
import { faceVariables } from "./fonts/faces";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Bismar", template: "%s · Bismar" },
  description:
    "The intake ledger of a community plastic-collection scheme: every gram from the drop-off point to the finished piece.",
};

export const viewport: Viewport = {
  width: "device-width",
  initialScale: 1,
  viewportFit: "cover",
  colorScheme: "light dark",
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#f4f1e9" },
    { media: "(prefers-color-scheme: dark)", color: "#121a17" },
  ],
};

/** Reading the nonce makes every page dynamic, which a nonce policy needs: a stored page would hold an old one. */
export default async function RootLayout({ children }: { children: ReactNode }) {
  const nonce = (await headers()).get("x-nonce") ?? undefined;
  return (
    <html lang="en" className={faceVariables}>
      <head>
        <meta property="csp-nonce" content="" nonce={nonce} />
      </head>
      <body className="min-h-dvh font-body antialiased">{children}</body>
    </html>
  );
}
