"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";

/**
 * Ends the session on this device through next-auth's own door, written out here because its client library
 * is larger than all the rest of the shell.
 *
 * @returns whether the session has ended
 */
async function signOut(): Promise<boolean> {
  try {
    const answer = await fetch("/api/auth/csrf");
    const { csrfToken } = (await answer.json()) as { csrfToken: string };
    const ended = await fetch("/api/auth/signout", {
      method: "POST",
      headers: { "content-type": "application/x-www-form-urlencoded" },
      body: new URLSearchParams({ csrfToken, callbackUrl: "/", json: "true" }),
    });
    return ended.ok;
  } catch {
    return false;
  }
}

/** Signing out, with a word when there is no connection: the person is then still signed in. */
export function SignOutButton({ size = "large" }: { size?: "large" | "small" }) {
  const [state, setState] = useState<"idle" | "busy" | "failed">("idle");
  return (
    <div>
      <Button
        variant="quiet"
        size={size}
        className="w-full"
        busy={state === "busy"}
        onClick={async () => {
          setState("busy");
          if (await signOut()) window.location.assign("/");
          else setState("failed");
        }}
      >
        Sign out
      </Button>
      <p role="status" className="mt-2 text-sm font-bold text-bad empty:hidden">
        {state === "failed" ? "No connection. You are still signed in; try again later." : ""}
      </p>
    </div>
  );
}
