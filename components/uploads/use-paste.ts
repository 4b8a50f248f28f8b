"use client";

import { useEffect } from "react";

/** Files that are pasted anywhere on the page, as on a desk. */
export function usePaste(onFiles: (files: File[]) => void, on: boolean): void {
  useEffect(() => {
    if (!on) return;
    const paste = (event: ClipboardEvent) => {
      const files = [...(event.clipboardData?.files ?? [])];
      // Text goes into its field, also when a spreadsheet lays a picture of it beside it.
      if (files.length === 0 || event.clipboardData?.types.includes("text/plain")) return;
      event.preventDefault();
      onFiles(files);
    };
    document.addEventListener("paste", paste);
    return () => document.removeEventListener("paste", paste);
  }, [onFiles, on]);
}
