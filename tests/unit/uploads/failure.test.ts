import { UploadThingError } from "uploadthing/server";
import { describe, expect, it } from "vitest";
import { ERROR_STATUS, type ErrorCode } from "@/lib/core/errors";
import { isPhotoCode, PHOTO_SENTENCES, photoSentence } from "@/lib/core/photo-messages";
import { completionFailure, mayRetry, uploadFailure } from "@/lib/uploads/rules/failure";

const failed = (message: string, data?: object): unknown =>
  new UploadThingError({
    code: "UPLOAD_FAILED",
    message,
    ...(data ? { data: data as never } : {}),
  });

describe("what an upload's client throws", () => {
  it.each([
    [
      "our own refusal",
      new UploadThingError({
        code: "BAD_REQUEST",
        message: "x",
        cause: { code: "photo-heic", values: {} },
      }),
      "photo-heic",
    ],
    ["a link that ran out", failed("XHR failed 403 Forbidden"), "photo-link-expired"],
    ["a tampered link", failed("XHR failed 401 Unauthorized"), "photo-link-refused"],
    ["a storage that was never told", failed("XHR failed 404 Not Found"), "photo-link-refused"],
    ["a used link", failed("XHR failed 409 Conflict"), "photo-link-used"],
    ["more bytes than declared", failed("XHR failed 413 Payload Too Large"), "photo-too-large"],
    ["fewer bytes than declared", failed("XHR failed 400 Bad Request"), "photo-cut-off"],
    ["a storage that fails", failed("XHR failed 503 Service Unavailable"), "photo-storage-down"],
    ["a status that nobody knows", failed("XHR failed 418 Teapot"), "photo-unfinished"],
    ["a line that broke", new UploadThingError({ code: "UPLOAD_FAILED" }), "photo-cut-off"],
    [
      "a completion that failed",
      failed("no", { error: "the completion answered 500" }),
      "photo-unfinished",
    ],
    [
      "a storage that cannot be reached",
      new UploadThingError({
        code: "INTERNAL_CLIENT_ERROR",
        message: "Something went wrong. Please report this to UploadThing.",
      }),
      "photo-storage-down",
    ],
    ["the same without the hook", { _tag: "FetchError", message: "" }, "photo-storage-down"],
    [
      "a program that cannot be reached",
      new UploadThingError({
        code: "INTERNAL_CLIENT_ERROR",
        message: 'Failed to report event "upload" to UploadThing server',
      }),
      "photo-cut-off",
    ],
    ["a stop", { _tag: "UploadAborted", message: "" }, "photo-cancelled"],
    ["a stop before it began", new DOMException("", "AbortError"), "photo-cancelled"],
    ["something else", new Error("what"), "photo-unfinished"],
    ["nothing", undefined, "photo-unfinished"],
  ] as [string, unknown, ErrorCode][])("for %s becomes our own code", (_, error, code) => {
    expect(uploadFailure(error).code).toBe(code);
  });

  it("keeps the values of our own refusals, and only plain ones", () => {
    const cause = { code: "photos-too-many", values: { most: 12, nested: { url: "secret" } } };
    const error = new UploadThingError({ code: "BAD_REQUEST", message: "x", cause });
    expect(uploadFailure(error)).toEqual({ code: "photos-too-many", values: { most: 12 } });
  });

  it("does not believe a code that is none of ours", () => {
    const error = new UploadThingError({
      code: "UPLOAD_FAILED",
      message: "XHR failed 500",
      cause: { code: "toString" },
    });
    expect(uploadFailure(error).code).toBe("photo-storage-down");
    expect(completionFailure("toString").code).toBe("photo-unfinished");
    expect(completionFailure("photo-heic").code).toBe("photo-heic");
  });
});

describe("the sentence of every such code", () => {
  it("says what was kept and what to do, and names nobody's service", () => {
    for (const code of Object.keys(PHOTO_SENTENCES)) {
      if (!isPhotoCode(code)) throw new Error("not a code");
      const words = photoSentence(code, { most: 12 });
      expect(Object.hasOwn(ERROR_STATUS, code)).toBe(true);
      expect(words).toMatch(/kept|Everything else works/);
      expect(words).not.toMatch(/upload ?thing/i);
    }
  });

  it("asks to try again where that can help", () => {
    for (const code of Object.keys(PHOTO_SENTENCES)) {
      if (!isPhotoCode(code) || code === "photo-cancelled") continue;
      expect([
        code,
        /try (again|the picture again)/.test(photoSentence(code, { most: 12 })),
      ]).toEqual([code, mayRetry(code)]);
    }
  });
});
