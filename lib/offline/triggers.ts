/** When the queue is sent: by time, when the page is looked at again, and when the browser says "online". */

const EVERY_MS = 15_000;

/**
 * Calls `send` on each occasion until the returned function is called. "online" is one hint among others:
 * a browser may say it is online without signal, or never say it again.
 */
export function sendingOccasions(send: () => void): () => void {
  const seen = () => {
    if (document.visibilityState === "visible") send();
  };
  const timer = setInterval(send, EVERY_MS);
  window.addEventListener("online", send);
  window.addEventListener("focus", send);
  document.addEventListener("visibilitychange", seen);
  return () => {
    clearInterval(timer);
    window.removeEventListener("online", send);
    window.removeEventListener("focus", send);
    document.removeEventListener("visibilitychange", seen);
  };
}

/** One tab sends at a time. Without Web Locks (no https) each tab sends; the request ids keep that harmless. */
export async function aloneAmongTabs<T>(name: string, work: () => Promise<T>): Promise<T | null> {
  if (!("locks" in navigator)) return work();
  return navigator.locks.request(name, { ifAvailable: true }, (lock) =>
    lock === null ? null : work(),
  );
}
