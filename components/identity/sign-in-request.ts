import type { ErrorCode } from "@/lib/core/errors";
import { sentence } from "@/lib/core/messages";
import { UNREACHABLE_SENTENCE } from "@/components/forms/problem-document";

export type SignInResult = { ok: true } | { ok: false; sentence: string };

const PATIENCE_MS = 30_000;

/** next-auth answers with the address of its error page; the error is in its query. */
function refusalIn(address: string): string | null {
  return new URL(address, window.location.href).searchParams.get("error");
}

/** "sign-in-slowed:40" as its sentence; what is not ours is a failure of the program. */
function sentenceOf(refusal: string): string {
  const [code = "", seconds = ""] = refusal.split(":");
  const known: readonly ErrorCode[] = ["wrong-sign-in", "sign-in-slowed"];
  const found = known.find((each) => each === code);
  return found ? sentence(found, { seconds }) : sentence("internal", { requestId: "(none)" });
}

/**
 * Signs in through next-auth's own door, written out here because its client library is larger than the
 * page.
 */
export async function requestSignIn(email: string, password: string): Promise<SignInResult> {
  const signal = AbortSignal.timeout(PATIENCE_MS);
  try {
    const first = await fetch("/api/auth/csrf", { cache: "no-store", signal });
    const { csrfToken } = (await first.json()) as { csrfToken: string };
    const answer = await fetch("/api/auth/callback/credentials", {
      method: "POST",
      headers: { "content-type": "application/x-www-form-urlencoded" },
      body: new URLSearchParams({ csrfToken, email, password, callbackUrl: "/", json: "true" }),
      signal,
    });
    const { url } = (await answer.json()) as { url?: string };
    const refusal = url === undefined ? "internal" : refusalIn(url);
    if (answer.ok && refusal === null) return { ok: true };
    return { ok: false, sentence: sentenceOf(refusal ?? "internal") };
  } catch {
    return { ok: false, sentence: UNREACHABLE_SENTENCE };
  }
}
