"use client";

import { useEffect, useState, type ComponentType } from "react";

/** A part of the page that travels when it is first wanted; "failed" when it could not be fetched. */
type Late<Props> = ComponentType<Props> | "failed" | null;

/**
 * Loads a part once it is wanted, and again on the next wish if that failed: without signal a page must neither
 * break nor remember that it did.
 *
 * @param load constant, such as a function outside the component
 */
export function useLate<Props>(
  load: () => Promise<ComponentType<Props>>,
  wanted: boolean,
): Late<Props> {
  const [part, setPart] = useState<Late<Props>>(null);
  useEffect(() => {
    if (!wanted) return;
    let left = false;
    load().then(
      (loaded) => {
        if (!left) setPart(() => loaded);
      },
      () => {
        if (!left) setPart("failed");
      },
    );
    return () => {
      left = true;
    };
  }, [load, wanted]);
  return wanted ? part : null;
}
