/**
 * Invariant: every point has a name of its own (case and spaces do not tell two names apart), and the two
 * built-in points, "At the shed" and "Not known", always exist, keep their names and stay open.
 */
import type { PointKind } from "./terms";

/** The two that are no places: where a bag without a tag is entered. */
export const BUILT_IN_POINTS = [
  { kind: "shed", name: "At the shed" },
  { kind: "not-known", name: "Not known" },
] as const satisfies readonly { kind: PointKind; name: string }[];

export function isBuiltIn(kind: PointKind): boolean {
  return BUILT_IN_POINTS.some((point) => point.kind === kind);
}
