"use client";

import { Button } from "@/components/ui/button";

/** Opens the browser's own print dialog. */
export function PrintButton() {
  return <Button onClick={() => window.print()}>Print</Button>;
}
