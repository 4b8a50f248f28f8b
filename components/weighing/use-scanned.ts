"use client";

import { useQuery } from "@tanstack/react-query";
import { useMemo } from "react";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import { ProblemError } from "@/components/forms/problem-document";
import type { Settled } from "@/components/scanner/camera-view";
import { readScan } from "@/lib/core/bag-code";
import type { scannedEndpoint } from "@/lib/weighing/contract/weigh-ins";
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

/** For the scanner: what the code in the field turned out to be; null until that is known. */
export function useSettledScan(typed: string, scanned: ScannedQuery): Settled | null {
  const code = readScan(typed);
  const { data, error } = scanned;
  return useMemo(() => {
    if (code === null) return null;
    if (data) return { code, verdict: data.kind === "bag" ? "read" : "unknown" };
    if (error === null) return null;
    // Without an answer the tag was read all the same: what it stands for is found out when the ticket is sent.
    return { code, verdict: error instanceof ProblemError ? "unknown" : "read" };
  }, [code, data, error]);
}
