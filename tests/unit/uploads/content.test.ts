import fs from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import sharp from "sharp";
import { pictureKind } from "@/lib/uploads/rules/content";

const blank = () => sharp({ create: { width: 8, height: 8, channels: 3, background: "#336699" } });
const brand = (name: string) => Buffer.from(`\0\0\0\u0018ftyp${name}\0\0\0\0`, "latin1");

describe("the kind of a picture", () => {
  it.each(["jpeg", "png", "webp"] as const)("of %s is read from its bytes", async (format) => {
    expect(pictureKind(await blank().toFormat(format).toBuffer())).toBe(format);
  });

  it.each(["gif", "tiff", "avif"] as const)("of %s is none that is taken", async (format) => {
    expect(pictureKind(await blank().toFormat(format).toBuffer())).toBeNull();
  });

  it.each(["heic", "heix", "hevc", "mif1", "msf1"])("with the brand %s is HEIC", (name) => {
    expect(pictureKind(brand(name))).toBe("heic");
  });

  it("is none for a film, a page, a program, a few bytes or none", () => {
    expect(pictureKind(brand("isom"))).toBeNull();
    expect(pictureKind(Buffer.from("<svg xmlns='http://www.w3.org/2000/svg'/>"))).toBeNull();
    expect(pictureKind(fs.readFileSync(process.execPath).subarray(0, 64))).toBeNull();
    expect(pictureKind(fs.readFileSync(path.resolve("package.json")))).toBeNull();
    expect(pictureKind(Buffer.from([0xff, 0xd8]))).toBeNull();
    expect(pictureKind(new Uint8Array())).toBeNull();
  });
});
