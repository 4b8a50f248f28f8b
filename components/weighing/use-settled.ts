"use client";

import { useEffect, useState } from "react";

/** The value once it has stood still for a while, so that nobody is corrected in the middle of a figure. */
export function useSettled<T>(value: T, ms: number): T {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), ms);
    return () => clearTimeout(timer);
  }, [value, ms]);
  return settled;
}
