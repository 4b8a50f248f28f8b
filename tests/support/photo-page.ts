/** Pictures for browser tests, and the photos part of a page as a test uses it. */
import type { Locator, Page } from "@playwright/test";
import sharp from "sharp";

export type PickedFile = { name: string; mimeType: string; buffer: Buffer };

/** A JPEG as a phone writes it: larger than what is sent, with a place in its EXIF. */
export async function phonePicture(
  name: string,
  hex: string,
  size: { width: number; height: number } = { width: 2400, height: 1800 },
): Promise<PickedFile> {
  const buffer = await sharp({ create: { ...size, channels: 3, background: hex } })
    .withExif({
      IFD0: { Make: "Invented phone" },
      IFD3: { GPSLatitudeRef: "N", GPSLatitude: "51/1 30/1 0/1" },
    })
    .jpeg()
    .toBuffer();
  return { name, mimeType: "image/jpeg", buffer };
}

/** The first bytes of a picture in the HEIC form; browsers here cannot read the rest either. */
export const heicPicture: PickedFile = {
  name: "IMG_2041.HEIC",
  mimeType: "image/heic",
  buffer: Buffer.concat([
    Buffer.from([0, 0, 0, 24]),
    Buffer.from("ftypheic"),
    Buffer.alloc(400, 1),
  ]),
};
export const noPicture: PickedFile = {
  name: "letter.jpg",
  mimeType: "image/jpeg",
  buffer: Buffer.from("This is a letter."),
};
export const emptyFile: PickedFile = {
  name: "empty.jpg",
  mimeType: "image/jpeg",
  buffer: Buffer.alloc(0),
};

/** The photos of "this bag", "this lot". */
export function photosOf(page: Page, what: "bag" | "lot" | "removal") {
  const part = page.getByRole("region", { name: `Photos of this ${what}` });
  const shown: Locator = part.locator("ul img[src^='/api/photos/']");
  return {
    part,
    /** Those that the server has. */
    shown,
    /** Chooses files, as with "Choose". */
    choose: (...files: PickedFile[]) =>
      part.getByLabel(`Choose: Photos of this ${what}`).setInputFiles(files),
    chooseChip: (file: PickedFile) => part.getByLabel("Choose: chip photo").setInputFiles([file]),
    /** Opens a small picture, by its place from 1. */
    open: async (place: number): Promise<Locator> => {
      await part
        .locator("ul button:has(img)")
        .nth(place - 1)
        .click();
      return page.getByRole("dialog", { name: "Photo" });
    },
  };
}

/** As when a helper comes back to the page: what waits is tried again. */
export const comeBack = (page: Page): Promise<boolean> =>
  page.evaluate(() => window.dispatchEvent(new Event("online")));
