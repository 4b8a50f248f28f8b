import { spawnSync } from "node:child_process";
import path from "node:path";
import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest";
import { DELETE as removeHandler, GET as fileHandler } from "@/app/api/photos/[id]/route";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { removePhoto } from "@/lib/uploads/commands/remove-photo";
import { tidyPhotos } from "@/lib/uploads/commands/tidy";
import { refusedCode } from "@/tests/support/async-refusal";
import { callHandler } from "@/tests/support/call-handler";
import { makePictureFile, photoDesk, type PhotoDesk } from "@/tests/support/photo-desk";

const ROOT = path.resolve(import.meta.dirname, "../../..");
const DAY_MS = 24 * 60 * 60 * 1000;

let desk: PhotoDesk;
let picture: Buffer;
beforeAll(async () => {
  desk = await photoDesk();
  picture = await makePictureFile();
});
afterEach(() => desk.clear());
afterAll(() => desk.close());

const added = async (saved = true): Promise<Id<"photo">> => {
  const input = desk.input(saved ? { subjectId: desk.weighIn() } : {});
  await desk.upload(input, picture);
  return input.photoId;
};
const remove = (
  id: string,
  requestId: string,
  role: "volunteer" | "lead" | "coordinator" = "lead",
) =>
  callHandler(removeHandler, {
    path: `/api/photos/${id}`,
    params: { id },
    cookie: desk.cookie(role),
    body: { requestId },
  });
const statusOf = async (id: string): Promise<number> => {
  const answer = await callHandler(fileHandler, {
    path: `/api/photos/${id}`,
    params: { id },
    cookie: desk.cookie("coordinator"),
  });
  await answer.body?.cancel();
  return answer.status;
};
const stored = (id: string) =>
  desk.rows<{ removed_by: string | null; removed_at: number; files_deleted_at: number | null }>(
    "select removed_by, removed_at, files_deleted_at from photos where id = ?",
    id,
  )[0];
const audit = () =>
  desk.rows<{ action: string; actor: string | null; fields: string }>(
    "select action, actor, fields from audit_events where action like 'photos.%' and action <> 'photos.add' order by id",
  );

describe("removing a photo", () => {
  it("takes it from everybody, and its files from the storage; the audit keeps who did it", async () => {
    const id = await added();
    const before = audit().length;
    const requestId = newId();
    const answer = await remove(id, requestId);
    expect([answer.status, await answer.json()]).toEqual([200, { id }]);
    expect(await statusOf(id)).toBe(404);
    expect(desk.namesIn("files")).toEqual([]);
    expect(stored(id)).toMatchObject({
      removed_by: desk.people.lead,
      files_deleted_at: expect.any(Number) as number,
    });
    // The same request again gives the same answer, and does nothing.
    expect(await (await remove(id, requestId)).json()).toEqual({ id });
    expect(audit().slice(before)).toEqual([
      {
        action: "photos.remove",
        actor: desk.people.lead,
        fields: JSON.stringify({ photoId: id, purpose: "view", ownerId: desk.people.volunteer }),
      },
    ]);
    expect((await remove(id, newId())).status).toBe(404);
  });

  it("of what is not saved yet is for whoever took it, and for nobody else", async () => {
    const input = desk.input();
    await desk.upload(input, picture);
    const id = input.photoId;
    const before = audit().length;
    for (const role of ["lead", "coordinator"] as const) {
      expect((await remove(id, newId(), role)).status).toBe(404);
    }
    const answer = await remove(id, newId(), "volunteer");
    expect([answer.status, await answer.json()]).toEqual([200, { id }]);
    expect(stored(id)?.removed_by).toBe(desk.people.volunteer);
    expect(desk.namesIn("files")).toEqual([]);
    expect(audit().slice(before)).toEqual([
      {
        action: "photos.remove",
        actor: desk.people.volunteer,
        fields: JSON.stringify({ photoId: id, purpose: "view", ownerId: desk.people.volunteer }),
      },
    ]);
  });

  it("of another person, of what is not saved yet, is not found for a volunteer", async () => {
    const input = desk.input();
    await desk.upload(input, picture, "lead");
    expect((await remove(input.photoId, newId(), "volunteer")).status).toBe(404);
    expect(stored(input.photoId)?.removed_at).toBeNull();
    expect((await remove(input.photoId, newId(), "lead")).status).toBe(200);
  });

  it("of a saved record is for leads and coordinators", async () => {
    const id = await added();
    expect((await remove(id, newId(), "volunteer")).status).toBe(403);
    expect(await statusOf(id)).toBe(200);
    const input = { id, requestId: newId() };
    expect(await refusedCode(removePhoto(desk.ctx("nobody"), input))).toBe("signed-out");
    expect((await remove(id, newId(), "coordinator")).status).toBe(200);
  });

  it("while the storage is down hides it, and the tidying deletes its files", async () => {
    const id = await added();
    await desk.store.stop();
    expect((await remove(id, newId())).status).toBe(200);
    expect(await statusOf(id)).toBe(404);
    expect(stored(id)?.files_deleted_at).toBeNull();
    expect(await refusedCode(tidyPhotos(desk.ctx("system"), desk.storage))).toBe(
      "photo-storage-down",
    );
    await desk.store.start();
    expect(desk.namesIn("files")).toHaveLength(2);
    const done = await tidyPhotos(desk.ctx("system"), desk.storage);
    expect(done).toEqual({ unreferred: 0, filesDeleted: 1, leftBehind: 0 });
    expect(desk.namesIn("files")).toEqual([]);
  });

  it("frees its place, and that of a chip", async () => {
    const subjectId = desk.lot();
    const chip = () => desk.input({ subjectKind: "lot", subjectId, purpose: "chip" });
    const first = chip();
    await desk.upload(first, picture);
    await remove(first.photoId, newId());
    expect(await desk.upload(chip(), picture)).toMatchObject({ ok: true });
    const audited = desk.rows<{ fields: string }>(
      "select fields from audit_events where action = 'photos.add' order by id desc limit 1",
    );
    expect(JSON.parse(audited[0]?.fields ?? "")).toMatchObject({ replacedChip: null });
  });

  it("is not undone by its completion being called again", async () => {
    const input = desk.input({ subjectId: desk.weighIn() });
    const { url, key } = await desk.addressFor(input, { size: picture.byteLength });
    await (await desk.put(url, picture)).json();
    await remove(input.photoId, newId());
    expect((await desk.callBack(desk.completion(input, key))).status).toBe(200);
    expect(await statusOf(input.photoId)).toBe(404);
  });
});

describe("tidying", () => {
  const tidyAt = (at: number) => tidyPhotos(desk.ctx("system", instant(at)), desk.storage);

  it("removes after a day what nothing refers to, and nothing else", async () => {
    const unsaved = await added(false);
    const saved = await added();
    const before = audit().length;
    expect(await tidyAt(Date.now() + DAY_MS - 60_000)).toMatchObject({ unreferred: 0 });
    expect(desk.photoCount()).toBe(2);
    const done = await tidyAt(Date.now() + DAY_MS + 60_000);
    expect(done).toEqual({ unreferred: 1, filesDeleted: 1, leftBehind: 0 });
    expect([await statusOf(unsaved), await statusOf(saved)]).toEqual([404, 200]);
    expect(stored(unsaved)?.removed_by).toBeNull();
    expect(desk.namesIn("files")).toHaveLength(2);
    expect(audit().slice(before)).toEqual([
      { action: "photos.tidy", actor: null, fields: JSON.stringify({ photoId: unsaved }) },
    ]);
    expect(await tidyAt(Date.now() + DAY_MS + 60_000)).toMatchObject({ unreferred: 0 });
  });

  it("deletes after a day the files of ours that no photo refers to", async () => {
    await added();
    await desk.storage.put(picture, "bismar-original");
    await desk.storage.put(picture, "bismar-large");
    await desk.storage.put(picture, "of-another-program");
    expect(desk.namesIn("files")).toHaveLength(5);
    expect(await tidyAt(Date.now() + DAY_MS - 60_000)).toMatchObject({ leftBehind: 0 });
    expect(await tidyAt(Date.now() + DAY_MS + 60_000)).toMatchObject({ leftBehind: 2 });
    expect(desk.namesIn("files")).toHaveLength(3);
    await desk.storage.remove(desk.namesIn("files"));
  });

  it("is not for a volunteer", async () => {
    const tidying = tidyPhotos(desk.ctx("volunteer"), desk.storage);
    expect(await refusedCode(tidying)).toBe("forbidden");
  });

  const command = () =>
    spawnSync(process.execPath, ["lib/cli/run.mjs", "photos-tidy"], {
      cwd: ROOT,
      encoding: "utf8",
      env: {
        PATH: process.env.PATH,
        NODE_ENV: "test",
        ...desk.environment,
        DATABASE_FILE: desk.db.file,
        PUBLIC_URL: desk.appUrl,
      },
    });

  it("as a command says what it did", async () => {
    const id = await added(false);
    desk.db.writer.client
      .prepare("update photos set added_at = ? where id = ?")
      .run(Date.now() - DAY_MS - 1000, id);
    const first = command();
    expect(first.stderr).toBe("");
    expect(first.stdout).toBe(
      "1 photo removed that nothing had referred to for a day.\nThe files of 1 removed photo deleted.\n0 files of uploads that broke off deleted.\n",
    );
    expect(first.status).toBe(0);
    expect(command().stdout).toBe("There was nothing to tidy.\n");
    await desk.store.stop();
    const down = command();
    expect([down.status, down.stdout.includes("nothing to tidy")]).toEqual([1, false]);
    expect(down.stderr).toContain("The picture storage does not answer.");
    expect(down.stderr).not.toContain("    at ");
  });
});
