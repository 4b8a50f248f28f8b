import type { ReactNode } from "react";
import { QueueIndicator } from "@/components/shell/queue-indicator";
import { Shell } from "@/components/shell/shell";
import { shellContext } from "@/lib/http/page-context";

/** The frame only. Who may see a page is decided by the page's own context, which also sends nobody to sign in. */
export default async function ShedLayout({ children }: { children: ReactNode }) {
  const { role, schemeName } = await shellContext();
  if (role === null) return children;
  return (
    <Shell role={role} schemeName={schemeName} queue={<QueueIndicator />}>
      {children}
    </Shell>
  );
}
