/**
 * next-auth's options: one way in, by mail address and password. Its cookie carries a person's and a
 * session's id and nothing else; whether that session lives is asked of the database on every request.
 */
import "server-only";
import type { NextAuthOptions } from "next-auth";
import CredentialsProvider from "next-auth/providers/credentials";
import { AppError } from "@/lib/core/errors";
import type { Context } from "@/lib/platform/context";
import type { Settings } from "@/lib/platform/env";
import { log } from "@/lib/platform/logger";
import { signIn, signOut } from "./commands/sign-in";
import { emailSchema } from "./contract";
import { MOST_PASSWORD, SESSION_MS, sessionCookieName } from "./terms";

/**
 * Why a sign-in was refused, as the page gets it: "wrong-sign-in" or "sign-in-slowed:40".
 * next-auth hands an error's message on as its code.
 */
function refusal(error: AppError): Error {
  const seconds = error.detail.seconds;
  return new Error(seconds === undefined ? error.code : `${error.code}:${seconds}`);
}

/**
 * Options for one request.
 *
 * @param ctx the request's own context, in which nobody acts yet
 */
export function authOptions(
  ctx: Context,
  { secret, publicUrl }: Pick<Settings, "secret" | "publicUrl">,
): NextAuthOptions {
  const secure = publicUrl.startsWith("https:");
  return {
    secret,
    useSecureCookies: secure,
    session: { strategy: "jwt", maxAge: SESSION_MS / 1000 },
    pages: { signIn: "/sign-in", signOut: "/account", error: "/sign-in" },
    cookies: {
      sessionToken: {
        name: sessionCookieName(secure),
        options: { httpOnly: true, sameSite: "lax", path: "/", secure },
      },
    },
    providers: [
      CredentialsProvider({
        credentials: { email: { type: "email" }, password: { type: "password" } },
        async authorize(credentials) {
          const email = emailSchema.safeParse(credentials?.email);
          const password = credentials?.password ?? "";
          // An address that is none, and a password that nobody can have, take the same way as any other
          // wrong pair, so that the answer and its time say nothing.
          const typed = email.success ? email.data : "not-an-address";
          try {
            const { personId, sessionId } = await signIn(ctx, {
              email: typed,
              password: password.slice(0, 4 * MOST_PASSWORD),
            });
            return { id: personId, personId, sessionId };
          } catch (error) {
            if (!(error instanceof AppError)) {
              log.error("sign-in-failed", error, { requestId: ctx.requestId });
              throw new Error("internal");
            }
            log.warn("sign-in-refused", { requestId: ctx.requestId, code: error.code });
            throw refusal(error);
          }
        },
      }),
    ],
    callbacks: {
      // `user` is there at sign-in only; later calls renew the cookie with what it carried.
      jwt: ({ token, user, trigger }) =>
        trigger === "signIn"
          ? { personId: user.personId, sessionId: user.sessionId }
          : { personId: token.personId, sessionId: token.sessionId },
      session: ({ session }) => ({ expires: session.expires }),
      redirect: ({ url, baseUrl }) =>
        url.startsWith("/") && !url.startsWith("//") ? `${baseUrl}${url}` : baseUrl,
    },
    events: {
      signOut({ token }) {
        signOut(ctx, token);
      },
    },
    logger: {
      error: (code, metadata) => {
        // A wrong password is no fault of the program; it was logged above.
        if (code !== "CREDENTIALS_SIGNIN_ERROR" && code !== "CALLBACK_CREDENTIALS_HANDLER_ERROR") {
          log.error("next-auth", metadata instanceof Error ? metadata : code, { code });
        }
      },
      warn: (code) => log.warn("next-auth", { code }),
      debug: () => undefined,
    },
  };
}
