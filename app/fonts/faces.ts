/**
 * The three typefaces, shipped with the program (SIL Open Font License, texts beside the files).
 * The "ext" faces carry letters such as Ł or ş for names; their unicode-range keeps them from being
 * fetched until such a letter is on the page. Mono is fetched when a figure is shown, not preloaded: most
 * pages should spend their first bytes on text.
 */
import localFont from "next/font/local";

export const bodyFace = localFont({
  src: "./atkinson-hyperlegible-next-latin-wght-normal.woff2",
  weight: "200 800",
  style: "normal",
  display: "swap",
  variable: "--face-body",
});

export const bodyExtFace = localFont({
  src: "./atkinson-hyperlegible-next-latin-ext-wght-normal.woff2",
  weight: "200 800",
  style: "normal",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0100-0130,U+0132-0151,U+0154-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+1E00-1E9F,U+1EF2-1EFF",
    },
  ],
  variable: "--face-body-ext",
});

export const headingFace = localFont({
  src: "./bricolage-grotesque-latin-wght-normal.woff2",
  weight: "200 800",
  style: "normal",
  display: "swap",
  variable: "--face-heading",
});

export const headingExtFace = localFont({
  src: "./bricolage-grotesque-latin-ext-wght-normal.woff2",
  weight: "200 800",
  style: "normal",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0100-0130,U+0132-0151,U+0154-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+1E00-1E9F,U+1EF2-1EFF",
    },
  ],
  variable: "--face-heading-ext",
});

export const monoFace = localFont({
  src: "./martian-mono-latin-wght-normal.woff2",
  weight: "100 800",
  style: "normal",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  fallback: ["ui-monospace", "Menlo", "Consolas", "DejaVu Sans Mono", "monospace"],
  variable: "--face-mono",
});

/** Class of the root element: makes the variables that app/globals.css names. */
export const faceVariables = [bodyFace, bodyExtFace, headingFace, headingExtFace, monoFace]
  .map((face) => face.variable)
  .join(" ");
