import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import sharp from "sharp";
import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest";
import { GET as listHandler } from "@/app/api/photos/route";
import { GET as fileHandler } from "@/app/api/photos/[id]/route";
import { newId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import { uploadRoute } from "@/lib/http/upload-route";
import { PHOTO_ROUTE } from "@/lib/uploads/terms";
import type { Photo } from "@/lib/uploads/contract";
import { callHandler } from "@/tests/support/call-handler";
import { makePictureFile, photoDesk, type PhotoDesk } from "@/tests/support/photo-desk";

let desk: PhotoDesk;
let picture: Buffer;
beforeAll(async () => {
  desk = await photoDesk();
  picture = await makePictureFile();
});
afterEach(() => desk.clear());
afterAll(() => desk.close());

const list = async (
  subjectKind: string,
  subjectId: string,
  role: Role = "volunteer",
): Promise<Photo[]> => {
  const query = new URLSearchParams({ subjectKind, subjectId });
  const answer = await callHandler(listHandler, {
    path: `/api/photos?${query.toString()}`,
    cookie: desk.cookie(role),
  });
  return ((await answer.json()) as { photos: Photo[] }).photos;
};
const serve = (
  id: string,
  call: { size?: string; role?: Role; headers?: Record<string, string> } = {},
) =>
  callHandler(fileHandler, {
    path: `/api/photos/${id}${call.size ? `?size=${call.size}` : ""}`,
    params: { id },
    cookie: call.role === undefined ? desk.cookie("volunteer") : desk.cookie(call.role),
    headers: call.headers ?? {},
  });
const bytesOf = async (answer: Response) => Buffer.from(await answer.arrayBuffer());

describe("a photo", () => {
  it("of a saved weigh-in is kept upright, scaled, without any metadata, and its original is gone", async () => {
    const sent = await makePictureFile({ width: 2400, height: 1600, orientation: 6 });
    const before = await sharp(sent).metadata();
    expect([before.orientation, before.exif?.includes("Phone of a neighbour")]).toEqual([6, true]);
    const subjectId = desk.weighIn();
    const input = desk.input({ subjectId });

    const uploaded = await desk.upload(input, sent);

    // Orientation 6: what was left is at the top once it is upright.
    const photo = {
      id: input.photoId,
      purpose: "view",
      width: 1067,
      height: 1600,
      addedBy: "Test volunteer",
      lab: null,
    };
    expect(uploaded).toMatchObject({ ok: true, photo });
    expect(await list("weigh-in", subjectId)).toMatchObject([photo]);
    expect(desk.namesIn("files")).toHaveLength(2);
    expect(desk.namesIn("partial")).toEqual([]);
    for (const name of desk.namesIn("files")) {
      const kept = fs.readFileSync(path.join(desk.store.folder, "files", name));
      expect(kept.includes("Phone of a neighbour")).toBe(false);
      expect(kept.includes("Exif")).toBe(false);
      const { exif, icc, xmp, iptc, orientation, format } = await sharp(kept).metadata();
      expect({ exif, icc, xmp, iptc, orientation, format }).toEqual({ format: "jpeg" });
    }
    const large = await sharp(await bytesOf(await serve(input.photoId)))
      .raw()
      .toBuffer({ resolveWithObject: true });
    const blueAt = (row: number) => large.data[(row * large.info.width + 500) * 3 + 2] ?? 0;
    expect(blueAt(200)).toBeLessThan(120);
    expect(blueAt(1400)).toBeGreaterThan(160);
    const thumb = await sharp(
      await bytesOf(await serve(input.photoId, { size: "thumb" })),
    ).metadata();
    expect([thumb.width, thumb.height]).toEqual([213, 320]);
  });

  it("leaves one audit row in its owner's name", async () => {
    const input = desk.input({ subjectId: desk.weighIn() });
    await desk.upload(input, picture);
    const rows = desk.rows("select * from audit_events where action = 'photos.add'");
    expect(rows.at(-1)).toMatchObject({
      actor: desk.people.volunteer,
      subject_kind: "weigh-in",
      subject_id: input.subjectId,
      fields: JSON.stringify({ photoId: input.photoId, purpose: "view", replacedChip: null }),
    });
  });

  it.each(["png", "webp"] as const)("may be sent as %s, whatever it is called", async (format) => {
    const bytes = await makePictureFile({ format });
    const answer = await desk.upload(desk.input(), bytes);
    expect(answer).toMatchObject({ ok: true, photo: { width: 400, height: 300 } });
  });

  it("may come before its weigh-in, and is seen by its owner alone until then", async () => {
    const requestId = newId();
    const input = desk.input({ subjectId: requestId });
    await desk.upload(input, picture);
    expect(await list("weigh-in", requestId)).toHaveLength(1);
    expect(await list("weigh-in", requestId, "coordinator")).toEqual([]);
    expect((await serve(input.photoId)).status).toBe(200);
    expect((await serve(input.photoId, { role: "coordinator" })).status).toBe(404);

    desk.weigh(desk.tags(1)[0] ?? "", {}, { requestId });

    expect(await list("weigh-in", requestId, "coordinator")).toHaveLength(1);
    const seen = await serve(input.photoId, { role: "coordinator" });
    expect(seen.status).toBe(200);
    await seen.body?.cancel();
  });

  it("is served under our own headers, and not again to who has it", async () => {
    const input = desk.input();
    await desk.upload(input, picture);
    const answer = await serve(input.photoId);
    const headers = Object.fromEntries(answer.headers);
    expect(headers).toMatchObject({
      "content-type": "image/jpeg",
      "x-content-type-options": "nosniff",
      "content-security-policy": "default-src 'none'; sandbox",
      "cross-origin-resource-policy": "same-origin",
      "cache-control": "private, max-age=3600",
      vary: "cookie",
      etag: `"${input.photoId}-large"`,
    });
    const bytes = await bytesOf(answer);
    expect(headers["content-length"]).toBe(String(bytes.byteLength));
    const again = await serve(input.photoId, { headers: { "if-none-match": headers.etag ?? "" } });
    expect([again.status, (await bytesOf(again)).byteLength]).toEqual([304, 0]);
    const thumb = await serve(input.photoId, {
      size: "thumb",
      headers: { "if-none-match": headers.etag ?? "" },
    });
    expect(thumb.status).toBe(200);
    await thumb.body?.cancel();
  });

  it("is 404 when there is none, and 503 while the storage is down", async () => {
    expect((await serve(newId())).status).toBe(404);
    const input = desk.input();
    await desk.upload(input, picture);
    await desk.store.stop();
    const down = await serve(input.photoId);
    expect(down.status).toBe(503);
    expect(await down.json()).toMatchObject({ code: "photo-storage-down" });
  });
});

describe("a chip photo", () => {
  const chip = (subjectId: string) =>
    desk.input({ subjectKind: "lot", subjectId, purpose: "chip" });

  it("has the colour of its middle, and takes the place of the one before", async () => {
    const subjectId = desk.lot();
    const first = chip(subjectId);
    // sRGB (60, 110, 190) is L* 46.75, a* 9.75, b* -47.01 in CIELAB D65 (IEC 61966-2-1, CIE 15).
    const blue = await desk.upload(first, picture);
    expect(blue).toMatchObject({ ok: true, photo: { purpose: "chip" } });
    const second = chip(subjectId);
    const grey = await makePictureFile({ colour: { r: 119, g: 119, b: 119 } });
    await desk.upload(second, grey);
    const [older, newer] = await list("lot", subjectId);
    expect([older?.id, older?.purpose]).toEqual([first.photoId, "view"]);
    expect([newer?.id, newer?.purpose]).toEqual([second.photoId, "chip"]);
    const off = Math.hypot(
      (older?.lab?.l ?? 0) - 46.75,
      (older?.lab?.a ?? 0) - 9.75,
      (older?.lab?.b ?? 0) + 47.01,
    );
    expect(off).toBeLessThan(2);
    // (119, 119, 119) is L* 50.03 and no colour.
    expect(newer?.lab?.l).toBeCloseTo(50.03, 0);
    expect(Math.abs(newer?.lab?.a ?? 99) + Math.abs(newer?.lab?.b ?? 99)).toBeLessThan(2);
    const rows = desk.rows<{ fields: string }>(
      "select fields from audit_events where action = 'photos.add' order by id desc limit 1",
    );
    expect(JSON.parse(rows[0]?.fields ?? "")).toMatchObject({ replacedChip: first.photoId });
  });

  it("is of a lot only", async () => {
    const problem = await desk.refusal(
      desk.ask(desk.input({ subjectId: desk.weighIn(), purpose: "chip" }), [{}]),
    );
    expect(problem.code).toBe("photo-subject-unknown");
  });
});

describe("the protocol's door", () => {
  it("tells everybody the same about what may be sent", async () => {
    const answer = await uploadRoute(new Request(`${desk.appUrl}/api/uploadthing`));
    const told = (await answer.json()) as { slug: string; config: object }[];
    expect(told.map(({ slug }) => slug)).toEqual([PHOTO_ROUTE]);
    expect(Object.keys(told[0]?.config ?? {})).toEqual(["image/jpeg", "image/png", "image/webp"]);
    expect(answer.headers.get("cache-control")).toBe("no-store");
  });

  it("gives every file a key of its own, and tells the storage no name", async () => {
    const keys = await Promise.all(
      Array.from({ length: 40 }, () => desk.addressFor(desk.input(), { name: "IMG_0001.jpg" })),
    );
    expect(new Set(keys.map(({ key }) => key)).size).toBe(40);
    expect(new Set(keys.map(({ name }) => name))).toEqual(new Set(["bismar-original"]));
    const { searchParams } = new URL(keys[0]?.url ?? "");
    expect(searchParams.get("x-ut-acl")).toBe("private");
    const life = Number(searchParams.get("expires")) - Date.now();
    expect(life).toBeGreaterThan(4 * 60_000);
    expect(life).toBeLessThanOrEqual(5 * 60_000);
  });

  it("has the completion called under PUBLIC_URL, whatever the request calls its host", async () => {
    const input = desk.input();
    const { url } = await (async () => {
      const answer = await desk.ask(input, [{ size: picture.byteLength }], {
        headers: { host: "evil.example" },
      });
      return ((await answer.json()) as { url: string }[])[0] ?? { url: "" };
    })();
    const stored = await desk.put(url, picture);
    expect(await stored.json()).toMatchObject({ serverData: { ok: true } });
  });

  it("keeps a file whose hash the storage tells, by the storage's own count", async () => {
    const { url } = await desk.addressFor(desk.input(), { size: picture.byteLength });
    const told = (await (await desk.put(url, picture)).json()) as { fileHash: string };
    expect(told.fileHash).toBe(createHash("md5").update(picture).digest("hex"));
  });
});
