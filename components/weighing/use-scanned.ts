"use client";

import { useQuery } from "@tanstack/react-query";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import { readScan } from "@/lib/core/bag-code";
import type { scannedEndpoint } from "@/lib/weighing/contract";
import { SCANNED_ADDRESS } from "@/lib/weighing/terms";

/** What the typed or scanned code stands for. Nothing is asked before the code's check character is right. */
export function useScanned(typed: string) {
  const code = readScan(typed);
  return useQuery({
    queryKey: ["scanned", code],
    queryFn: ({ signal }) =>
      fetchEndpoint<typeof scannedEndpoint>(SCANNED_ADDRESS, { code: code ?? "" }, signal),
    enabled: code !== null,
  });
}

export type ScannedQuery = ReturnType<typeof useScanned>;
