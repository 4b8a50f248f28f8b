import http from "node:http";
import net from "node:net";
import { afterEach, describe, expect, it } from "vitest";
import { choosePort, tryPort, waitUntilHealthy } from "@/lib/cli/ports.mjs";

const servers: net.Server[] = [];

async function listen(server: net.Server): Promise<number> {
  servers.push(server);
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  return (server.address() as net.AddressInfo).port;
}

afterEach(async () => {
  await Promise.all(
    servers.splice(0).map((server) => new Promise((resolve) => server.close(resolve))),
  );
});

describe("a port", () => {
  it("in use is seen, and a free one is found", async () => {
    const used = await listen(net.createServer());
    expect(await tryPort(used)).toBeNull();
    const free = await tryPort(0);
    expect(free).toBeGreaterThan(0);
    expect(free).not.toBe(used);
  });

  it("that was asked for is taken, or refused by name", async () => {
    const free = (await tryPort(0)) ?? 0;
    expect(await choosePort(String(free))).toBe(free);
    const used = await listen(net.createServer());
    await expect(choosePort(String(used))).rejects.toThrow(`Port ${used} (PORT) is in use`);
    for (const wrong of ["0", "65536", "http", "30.5", "-1"]) {
      await expect(choosePort(wrong)).rejects.toThrow(`PORT=${wrong} is not a port`);
    }
  });

  it("is any free one when none was asked for", async () => {
    for (const nothing of [undefined, ""]) expect(await choosePort(nothing)).toBeGreaterThan(0);
  });
});

describe("waiting for the program", () => {
  it("ends when it says that its database answers, not before", async () => {
    let asked = 0;
    const port = await listen(
      http.createServer((request, response) => {
        asked += 1;
        response.statusCode = request.url === "/api/health" && asked > 2 ? 200 : 503;
        response.end();
      }),
    );
    expect(await waitUntilHealthy(`http://127.0.0.1:${port}`, () => false)).toBe(true);
    expect(asked).toBe(3);
  });

  it("gives up when the process is gone or patience is over", async () => {
    const free = (await tryPort(0)) ?? 0;
    let looks = 0;
    const gone = () => (looks += 1) > 1;
    expect(await waitUntilHealthy(`http://127.0.0.1:${free}`, gone)).toBe(false);
    expect(await waitUntilHealthy(`http://127.0.0.1:${free}`, () => false, 300)).toBe(false);
  });
});
