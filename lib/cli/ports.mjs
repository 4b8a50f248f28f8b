/** Ports of this machine. */
import net from "node:net";

/**
 * Listens for a moment and lets go again.
 *
 * @param {number} port 0 for any free one
 * @param {string} host
 * @returns {Promise<number | null>} the port, or null when somebody else listens there
 */
export function tryPort(port, host = "127.0.0.1") {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once("error", (error) => {
      if (error.code === "EADDRINUSE") resolve(null);
      else reject(error);
    });
    server.listen({ port, host, exclusive: true }, () => {
      const found = server.address().port;
      server.close(() => resolve(found));
    });
  });
}

/**
 * The port to serve on: the one asked for, else 3000, else any that is free.
 *
 * @param {string | undefined} asked the variable PORT
 * @throws Error when PORT is no port, or somebody else listens there
 */
export async function choosePort(asked) {
  if (asked !== undefined && asked !== "") {
    const port = Number(asked);
    if (!Number.isInteger(port) || port < 1 || port > 65_535) {
      throw new Error(
        `PORT=${asked} is not a port. Give a number from 1 to 65535, or leave it out.`,
      );
    }
    if ((await tryPort(port)) === null) {
      throw new Error(
        `Port ${port} (PORT) is in use. Choose another, or leave PORT out for a free one.`,
      );
    }
    return port;
  }
  return (await tryPort(3000)) ?? (await tryPort(0)) ?? 0;
}

/**
 * Waits until the program answers that its database does.
 *
 * @param {string} url the program's address
 * @param {() => boolean} isGone has the server ended meanwhile?
 * @param {number} patienceMs
 * @returns {Promise<boolean>}
 */
export async function waitUntilHealthy(url, isGone, patienceMs = 60_000) {
  const deadline = Date.now() + patienceMs;
  while (Date.now() < deadline && !isGone()) {
    try {
      const answer = await fetch(`${url}/api/health`, { signal: AbortSignal.timeout(5000) });
      if (answer.ok) return true;
    } catch {
      // Not listening yet.
    }
    await new Promise((resolve) => setTimeout(resolve, 150));
  }
  return false;
}
