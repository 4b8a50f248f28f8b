import http from "node:http";
import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest";
import { sign } from "@/lib/cli/fake-storage/signature";
import { makePictureFile, photoDesk, type PhotoDesk } from "@/tests/support/photo-desk";

let desk: PhotoDesk;
let picture: Buffer;
beforeAll(async () => {
  desk = await photoDesk();
  picture = await makePictureFile();
});
afterEach(async () => {
  // Whatever was refused, nothing half done stays.
  await expect.poll(() => desk.namesIn("partial"), { timeout: 5000 }).toEqual([]);
  await desk.clear();
});
afterAll(() => desk.close());

const nothingKept = () => {
  expect(desk.photoCount()).toBe(0);
  expect(desk.namesIn("files")).toEqual([]);
};

describe("a link to send to", () => {
  const expired = (address: string): string => {
    const [before = ""] = address.split("&signature=");
    const past = before.replace(/expires=\d+/, `expires=${Date.now() - 1000}`);
    return `${past}&signature=${encodeURIComponent(sign(past, desk.apiKey))}`;
  };

  it("that has run out takes nothing", async () => {
    const { url } = await desk.addressFor(desk.input(), { size: picture.byteLength });
    expect((await desk.put(expired(url), picture)).status).toBe(403);
    nothingKept();
    // The link as it was given still works.
    expect((await desk.put(url, picture)).status).toBe(200);
  });

  it.each([
    ["its signature", (url: string) => url.replace(/.$/, (last) => (last === "0" ? "1" : "0"))],
    ["its size", (url: string) => url.replace(/file-size=\d+/, "file-size=99999999")],
    ["its life", (url: string) => url.replace(/expires=\d+/, "expires=99999999999999")],
    ["whether it is private", (url: string) => url.replace("acl=private", "acl=public-read")],
    ["its key", (url: string) => url.replace("?expires", "A?expires")],
    ["no signature", (url: string) => url.replace(/&signature=.*/, "")],
  ])("with another %s takes nothing", async (_, change) => {
    const { url } = await desk.addressFor(desk.input(), { size: picture.byteLength });
    const changed = change(url);
    expect(changed).not.toBe(url);
    expect((await desk.put(changed, picture)).status).toBe(401);
    nothingKept();
  });

  it("is good for one file", async () => {
    const { url } = await desk.addressFor(desk.input(), { size: picture.byteLength });
    const both = await Promise.all([desk.put(url, picture), desk.put(url, picture)]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect((await desk.put(url, picture)).status).toBe(409);
    expect(desk.photoCount()).toBe(1);
  });

  it("takes neither more nor fewer bytes than were declared", async () => {
    const { url: less } = await desk.addressFor(desk.input(), { size: picture.byteLength - 1 });
    expect((await desk.put(less, picture)).status).toBe(413);
    const { url: more } = await desk.addressFor(desk.input(), { size: picture.byteLength + 1 });
    expect((await desk.put(more, picture)).status).toBe(400);
    const { url: far } = await desk.addressFor(desk.input(), { size: 10 });
    expect((await desk.put(far, Buffer.alloc(3_000_000, 1))).status).toBe(413);
    nothingKept();
  });

  it("that the storage never heard of, because it was down, takes nothing", async () => {
    await desk.store.stop();
    const { url } = await desk.addressFor(desk.input(), { size: picture.byteLength });
    await expect(desk.put(url, picture)).rejects.toThrow();
    await desk.store.start();
    expect((await desk.put(url, picture)).status).toBe(404);
    nothingKept();
  });
});

describe("a connection that breaks", () => {
  /** Sends the first half of a picture and waits there. */
  async function half(address: string): Promise<http.ClientRequest> {
    const head = Buffer.from(
      '--x\r\nContent-Disposition: form-data; name="file"; filename="p.jpg"\r\nContent-Type: image/jpeg\r\n\r\n',
    );
    const tail = Buffer.from("\r\n--x--\r\n");
    const { hostname, port, pathname, search } = new URL(address);
    const request = http.request({
      method: "PUT",
      host: hostname,
      port,
      path: pathname + search,
      headers: {
        "content-type": "multipart/form-data; boundary=x",
        "content-length": head.byteLength + picture.byteLength + tail.byteLength,
      },
    });
    request.on("error", () => undefined);
    request.write(head);
    request.write(picture.subarray(0, picture.byteLength / 2));
    await expect.poll(() => desk.namesIn("partial").length, { timeout: 5000 }).toBe(1);
    return request;
  }

  it("leaves no partial file, and the same link may be tried again", async () => {
    const { url } = await desk.addressFor(desk.input(), { size: picture.byteLength });
    (await half(url)).destroy();
    await expect.poll(() => desk.namesIn("partial"), { timeout: 5000 }).toEqual([]);
    nothingKept();
    expect(await (await desk.put(url, picture)).json()).toMatchObject({ serverData: { ok: true } });
  });

  it("because the storage was ended leaves nothing once it is back", async () => {
    const { url } = await desk.addressFor(desk.input(), { size: picture.byteLength });
    await half(url);
    await desk.store.stop("SIGKILL");
    await desk.store.start();
    expect(desk.namesIn("partial")).toEqual([]);
    nothingKept();
    const input = desk.input();
    expect(await desk.upload(input, picture)).toMatchObject({ ok: true });
  });
});
