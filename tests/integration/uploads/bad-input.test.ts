import sharp from "sharp";
import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest";
import { DELETE as removeHandler, GET as fileHandler } from "@/app/api/photos/[id]/route";
import { sentence } from "@/lib/core/messages";
import { newId } from "@/lib/core/ids";
import { LARGE_EDGE_PIXELS, MOST_PHOTO_BYTES, MOST_PHOTOS } from "@/lib/uploads/terms";
import { callHandler } from "@/tests/support/call-handler";
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

describe("a request to send", () => {
  it.each([
    [
      "a program",
      { type: "application/x-msdownload", name: "picture.exe" },
      422,
      "photo-not-a-picture",
    ],
    [
      "a program called a picture",
      { type: "application/x-msdownload" },
      422,
      "photo-not-a-picture",
    ],
    ["a drawing that may hold scripts", { type: "image/svg+xml" }, 422, "photo-not-a-picture"],
    ["no type at all", { type: "" }, 422, "photo-not-a-picture"],
    ["HEIC", { type: "image/heic" }, 422, "photo-heic"],
    ["HEIF", { type: "image/heif" }, 422, "photo-heic"],
    ["one byte too many", { size: MOST_PHOTO_BYTES + 1 }, 413, "photo-too-large"],
    ["an empty file", { size: 0 }, 422, "photo-empty"],
    ["a size below nothing", { size: -5 }, 422, "photo-empty"],
    ["a size that is no number of bytes", { size: 1.5 }, 422, "photo-empty"],
  ] as const)("of %s is refused by its declaration", async (_, file, status, code) => {
    const problem = await desk.refusal(desk.ask(desk.input(), [file]));
    expect([problem.status, problem.code]).toEqual([status, code]);
    expect(problem.detail).toBe(sentence(code, problem.values));
    expect(JSON.stringify(problem)).not.toMatch(/upload ?thing/i);
  });

  it("of the largest file that goes is let through", async () => {
    const { url } = await desk.addressFor(desk.input(), { size: MOST_PHOTO_BYTES });
    expect(url).toContain(desk.store.url);
  });

  it.each([
    ["no file", []],
    ["several files", [{}, {}]],
  ])("of %s is refused", async (_, files) => {
    const problem = await desk.refusal(desk.ask(desk.input(), files));
    expect(problem.code).toBe(files.length === 0 ? "photo-empty" : "photos-too-many");
  });

  it("beyond what a subject holds is refused, but not another try of one that it holds", async () => {
    const subjectId = desk.weighIn();
    let last = desk.input({ subjectId });
    for (let n = 0; n < MOST_PHOTOS; n += 1) {
      last = desk.input({ subjectId });
      expect(await desk.upload(last, picture)).toMatchObject({ ok: true });
    }
    const problem = await desk.refusal(desk.ask(desk.input({ subjectId }), [{}]));
    expect([problem.status, problem.code]).toEqual([409, "photos-too-many"]);
    expect(problem.detail).toContain(`room for ${MOST_PHOTOS} pictures`);
    expect((await desk.ask(last, [{}])).status).toBe(200);
  });

  it.each([
    ["a lot that is not there", { subjectKind: "lot" as const, subjectId: newId() }],
    ["a weigh-in whose id no phone made", { subjectId: "1" }],
  ])("for %s is refused", async (_, over) => {
    const problem = await desk.refusal(desk.ask(desk.input(over), [{}]));
    expect(problem.code).toBe("photo-subject-unknown");
  });

  it("comes from a person of the shed, from our own page, in the protocol's form", async () => {
    const input = desk.input();
    const code = async (answer: Promise<Response>) => {
      const { status, code: found } = await desk.refusal(answer);
      return [status, found];
    };
    expect(await code(desk.ask(input, [{}], { role: null }))).toEqual([401, "signed-out"]);
    expect(await code(desk.ask(input, [{}], { role: "donor" }))).toEqual([403, "forbidden"]);
    const ended = { cookie: "bismar.session=nonsense" };
    expect(await code(desk.ask(input, [{}], { role: null, headers: ended }))).toEqual([
      401,
      "session-ended",
    ]);
    for (const headers of [
      { "sec-fetch-site": "cross-site" },
      { "sec-fetch-site": "same-site", "content-type": "text/plain" },
    ] as Record<string, string>[]) {
      expect(await code(desk.ask(input, [{}], { headers }))).toEqual([403, "cross-origin"]);
    }
    expect(await code(desk.ask({ ...input, photoId: "1" }, [{}]))).toEqual([422, "invalid"]);
    expect(await code(desk.ask("\ud800", [{}]))).toEqual([422, "invalid"]);
    expect(await code(desk.ask(input, [{}], { slug: "elsewhere" }))).toEqual([404, "not-found"]);
    const huge = [{ name: "x".repeat(70_000) }];
    expect(await code(desk.ask(input, huge))).toEqual([413, "too-large"]);
  });

  it("with a name that breaks addresses is taken all the same", async () => {
    const { url } = await desk.addressFor(desk.input(), {
      name: "\ud800 100% ünï.jpg",
      size: picture.byteLength,
    });
    expect(await (await desk.put(url, picture)).json()).toMatchObject({ serverData: { ok: true } });
  });
});

describe("what arrives", () => {
  const heic = Buffer.concat([
    Buffer.from([0, 0, 0, 24]),
    Buffer.from("ftypheic\0\0\0\0mif1heic"),
    Buffer.alloc(500, 7),
  ]);

  it.each([
    [
      "a program called picture.jpg",
      async () => Buffer.from(`MZ${"\0".repeat(800)}`),
      "photo-not-a-picture",
    ],
    ["HEIC called picture.jpg", async () => heic, "photo-heic"],
    [
      "a drawing",
      async () => Buffer.from("<svg xmlns='http://www.w3.org/2000/svg' width='9' height='9'/>"),
      "photo-not-a-picture",
    ],
    ["a GIF", async () => sharp(picture).gif().toBuffer(), "photo-not-a-picture"],
    [
      "a JPEG that ends too soon",
      async () => picture.subarray(0, picture.byteLength / 2),
      "photo-not-a-picture",
    ],
    [
      "the head of a PNG and then noise",
      async () =>
        Buffer.concat([
          (await makePictureFile({ format: "png" })).subarray(0, 60),
          Buffer.alloc(900, 3),
        ]),
      "photo-not-a-picture",
    ],
    [
      "more pixels than are decoded",
      async () =>
        sharp({ create: { width: 9000, height: 6000, channels: 3, background: "#888888" } })
          .jpeg({ quality: 20 })
          .toBuffer(),
      "photo-too-large",
    ],
  ] as const)("and is %s is not kept", async (_, make, reason) => {
    const answer = await desk.upload(desk.input(), await make());
    expect(answer).toEqual({ ok: false, reason });
    nothingKept();
  });

  it("and is small is not made larger", async () => {
    const answer = await desk.upload(
      desk.input(),
      await makePictureFile({ width: 90, height: 60 }),
    );
    expect(answer).toMatchObject({ ok: true, photo: { width: 90, height: 60 } });
    expect(LARGE_EDGE_PIXELS).toBeGreaterThan(90);
  });

  it("while its place has been taken is not kept", async () => {
    const subjectId = desk.weighIn();
    const late = desk.input({ subjectId });
    const { url } = await desk.addressFor(late, { size: picture.byteLength });
    for (let n = 0; n < MOST_PHOTOS; n += 1) await desk.upload(desk.input({ subjectId }), picture);
    const answer = await desk.put(url, picture);
    expect(await answer.json()).toMatchObject({
      serverData: { ok: false, reason: "photos-too-many" },
    });
    expect(desk.namesIn("files")).toHaveLength(2 * MOST_PHOTOS);
  });
});

describe("another person's photo", () => {
  it("of a weigh-in that is not saved is not there: not to see, not to remove", async () => {
    const input = desk.input();
    await desk.upload(input, picture);
    const call = { path: `/api/photos/${input.photoId}`, params: { id: input.photoId } };
    for (const role of ["lead", "coordinator"] as const) {
      const cookie = desk.cookie(role);
      const seen = await callHandler(fileHandler, { ...call, cookie });
      const removed = await callHandler(removeHandler, {
        ...call,
        cookie,
        body: { requestId: newId() },
      });
      expect([seen.status, removed.status]).toEqual([404, 404]);
    }
    expect(desk.photoCount()).toBe(1);
  });

  it("is not for donors, nor for nobody, saved or not", async () => {
    const input = desk.input({ subjectId: desk.weighIn() });
    await desk.upload(input, picture);
    const call = { path: `/api/photos/${input.photoId}`, params: { id: input.photoId } };
    const donor = await callHandler(fileHandler, { ...call, cookie: desk.cookie("donor") });
    const nobody = await callHandler(fileHandler, call);
    expect([donor.status, nobody.status]).toEqual([403, 401]);
  });
});
