/** There is always at least one coordinator who can sign in, and nobody raises or lowers themselves. */
import type { PersonId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";

type Target = { id: PersonId; role: Role; joined: boolean };
export type PeopleProblem = "own-role" | "last-coordinator";

/**
 * May this person get another role, or be removed (next: null)?
 *
 * @param by who asks; null for the program itself
 * @param coordinators how many coordinators can sign in now, the person among them
 */
export function checkChange(
  target: Target,
  next: Role | null,
  by: PersonId | null,
  coordinators: number,
): PeopleProblem | null {
  if (target.id === by && next !== target.role) return "own-role";
  const leaves = target.role === "coordinator" && target.joined && next !== "coordinator";
  return leaves && coordinators <= 1 ? "last-coordinator" : null;
}

/** Where a role begins when nothing else was wished for. */
export function homeOf(role: Role): "/account" | "/today" {
  return role === "donor" ? "/account" : "/today";
}

/**
 * Where to go after signing in: a path of this program, never another site. A browser reads "//host" and
 * "/\host" as another host, and drops tabs and line breaks before it looks.
 *
 * @returns the path with its query, or null when the wish is none of ours
 */
export function safeNext(wish: string | null | undefined): string | null {
  if (!wish?.startsWith("/") || wish.includes("\\") || /\p{Cc}/u.test(wish)) return null;
  let url: URL;
  try {
    url = new URL(wish, "http://own.invalid");
  } catch {
    return null;
  }
  if (url.origin !== "http://own.invalid" || url.pathname.startsWith("//")) return null;
  return url.pathname + url.search + url.hash;
}
