import type { PersonId, SessionId } from "@/lib/core/ids";

declare module "next-auth" {
  /** What a sign-in answers; the session row exists by then. */
  interface User {
    personId: PersonId;
    sessionId: SessionId;
  }
}

declare module "next-auth/jwt" {
  /** All that the cookie carries. Role and removal are read from the database on every request. */
  interface JWT {
    personId: PersonId;
    sessionId: SessionId;
  }
}
