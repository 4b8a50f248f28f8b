import type { ReactNode } from "react";
import { PublicFrame } from "@/components/shell/public-frame";
import { shellContext } from "@/lib/http/page-context";

export default async function PublicLayout({ children }: { children: ReactNode }) {
  const { role, schemeName } = await shellContext();
  return (
    <PublicFrame schemeName={schemeName} signedIn={role !== null}>
      {children}
    </PublicFrame>
  );
}
