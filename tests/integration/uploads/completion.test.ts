import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest";
import { storage, type Storage } from "@/lib/platform/storage";
import { addPhoto } from "@/lib/uploads/commands/add-photo";
import { MOST_PHOTOS } from "@/lib/uploads/terms";
import { refusedCode } from "@/tests/support/async-refusal";
import { makePictureFile, photoDesk, type PhotoDesk } from "@/tests/support/photo-desk";

let desk: PhotoDesk;
let picture: Buffer;
beforeAll(async () => {
  desk = await photoDesk();
  picture = await makePictureFile();
});
afterEach(() => desk.clear());
afterAll(() => desk.close());

describe("a second completion", () => {
  it("of the same file gives the same photo, and does nothing else", async () => {
    const input = desk.input();
    const { url, key } = await desk.addressFor(input, { size: picture.byteLength });
    const first = (await (await desk.put(url, picture)).json()) as { serverData: unknown };
    const files = desk.namesIn("files");
    const audited = desk.rows("select id from audit_events").length;
    const again = await desk.callBack(desk.completion(input, key));
    expect([again.status, await again.json()]).toEqual([200, null]);
    expect(desk.photoCount()).toBe(1);
    expect(desk.namesIn("files")).toEqual(files);
    expect(desk.rows("select id from audit_events")).toHaveLength(audited);
    expect(first.serverData).toMatchObject({ ok: true, photo: { id: input.photoId } });
  });

  it("at the same moment does the work once", async () => {
    const input = desk.input();
    const key = await desk.storage.put(picture, "bismar-original");
    const ctx = () => desk.ctx("volunteer");
    const both = await Promise.all([
      addPhoto(ctx(), desk.storage, { ...input, fileKey: key }),
      addPhoto(ctx(), desk.storage, { ...input, fileKey: key }),
    ]);
    expect(both[0]).toEqual(both[1]);
    expect(desk.photoCount()).toBe(1);
    expect(desk.namesIn("files")).toHaveLength(2);
  });

  it("of another file of the same photo, sent because an answer was lost, keeps the first", async () => {
    const input = desk.input();
    const first = await desk.upload(input, picture);
    const files = desk.namesIn("files");
    expect(await desk.upload(input, await makePictureFile({ width: 200, height: 200 }))).toEqual(
      first,
    );
    expect(desk.namesIn("files")).toEqual(files);
    expect(desk.photoCount()).toBe(1);
  });

  it("of another person's photo, or for another subject, is refused", async () => {
    const input = desk.input({ subjectId: desk.weighIn() });
    await desk.upload(input, picture);
    for (const [other, role] of [
      [input, "lead"],
      [{ ...input, subjectId: desk.weighIn() }, "volunteer"],
    ] as const) {
      const key = await desk.storage.put(picture, "bismar-original");
      const adding = addPhoto(desk.ctx(role), desk.storage, { ...other, fileKey: key });
      expect(await refusedCode(adding)).toBe("request-id-reused");
      expect((await desk.refusal(desk.ask(other, [{}], { role }))).code).toBe("request-id-reused");
    }
    expect(desk.namesIn("files")).toHaveLength(2);
  });

  it("that is forged is refused, and nothing happens", async () => {
    const key = await desk.storage.put(picture, "bismar-original");
    const { body, signature } = desk.completion(desk.input(), key);
    const altered = body.replace(desk.people.volunteer, desk.people.coordinator);
    for (const forged of [
      { body },
      { body, signature: `hmac-sha256=${"0".repeat(64)}` },
      { body, signature: "nonsense" },
      { body: altered, signature },
    ]) {
      const problem = await desk.refusal(desk.callBack(forged));
      expect([problem.status, problem.code]).toEqual([403, "forbidden"]);
    }
    expect(desk.photoCount()).toBe(0);
    expect(desk.namesIn("files")).toEqual([key]);
  });

  it("of somebody who was removed meanwhile keeps nothing", async () => {
    const key = await desk.storage.put(picture, "bismar-original");
    const person = desk.db.writer.client.prepare("update people set removed_at = ? where id = ?");
    person.run(Date.now(), desk.people.lead);
    const answer = await desk.callBack(desk.completion(desk.input(), key, "lead"));
    person.run(null, desk.people.lead);
    expect(answer.status).toBe(200);
    expect(desk.photoCount()).toBe(0);
  });
});

describe("when something fails", () => {
  /** The real storage, but for what a test breaks. */
  const broken = (change: Partial<Storage>): Storage => ({ ...storage(), ...change });
  const arrive = async () => ({
    ...desk.input(),
    fileKey: await desk.storage.put(picture, "bismar-original"),
  });

  it("at the second of two files, the first one goes too", async () => {
    const file = await arrive();
    let puts = 0;
    const half = broken({
      put: (bytes, name) => {
        puts += 1;
        return puts === 2 ? Promise.reject(new Error("broken")) : storage().put(bytes, name);
      },
    });
    await expect(addPhoto(desk.ctx("volunteer"), half, file)).rejects.toThrow("broken");
    expect(desk.namesIn("files")).toEqual([]);
    expect(desk.photoCount()).toBe(0);
  });

  it("in the database, both files go", async () => {
    const file = await arrive();
    desk.db.writer.client.exec(
      "create trigger broken before insert on photos begin select raise(abort, 'broken'); end",
    );
    await expect(addPhoto(desk.ctx("volunteer"), storage(), file)).rejects.toThrow("broken");
    desk.db.writer.client.exec("drop trigger broken");
    expect(desk.namesIn("files")).toEqual([]);
  });

  it("at reading what was sent, it says that the storage is down", async () => {
    const file = await arrive();
    await desk.store.stop();
    expect(await refusedCode(addPhoto(desk.ctx("volunteer"), storage(), file))).toBe(
      "photo-storage-down",
    );
    expect(desk.photoCount()).toBe(0);
  });

  it("because the place was taken while it was being worked on, nothing stays", async () => {
    const subjectId = desk.weighIn();
    const files = await Promise.all(
      Array.from({ length: MOST_PHOTOS + 2 }, async () => ({ ...(await arrive()), subjectId })),
    );
    const ends = await Promise.allSettled(
      files.map((file) => addPhoto(desk.ctx("volunteer"), storage(), file)),
    );
    expect(ends.filter(({ status }) => status === "fulfilled")).toHaveLength(MOST_PHOTOS);
    expect(desk.namesIn("files")).toHaveLength(2 * MOST_PHOTOS);
  });
});
