/** Called by Next once when the server starts, and for every error that a page or handler lets through. */
import type { Instrumentation } from "next";

export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME === "nodejs") {
    const { startServer } = await import("@/lib/http/start-server");
    startServer();
  }
}

/** The digest is the number that the error page shows; the log has the cause beside it. */
export const onRequestError: Instrumentation.onRequestError = async (error, request, context) => {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { log } = await import("@/lib/platform/logger");
  const requestId = request.headers["x-request-id"];
  const digest =
    typeof error === "object" && error !== null && "digest" in error ? String(error.digest) : null;
  log.error("page-failed", error, {
    digest,
    requestId: typeof requestId === "string" ? requestId : null,
    // The route's pattern, not the address: a link's token stands in an address.
    route: context.routePath,
    kind: context.routeType,
  });
};
