/** zbarimg (Debian's zbar-tools) on many pictures at once, from its XML. */
import { execFileSync } from "node:child_process";

/** @returns texts by file name; null when the program is not here */
export function readByZbar(files: readonly string[]): Map<string, string> | null {
  let xml: string;
  try {
    // No bus: it would report every symbol to a desktop, and complain for each that there is none.
    const flags = ["--nodbus", "-q", "--xml", "-Sdisable", "-Sqrcode.enable"];
    xml = execFileSync("zbarimg", [...flags, ...files], {
      encoding: "utf8",
      maxBuffer: 64 * 1024 * 1024,
      stdio: ["ignore", "pipe", "ignore"],
    });
  } catch (error) {
    if (error instanceof Error && "code" in error && error.code === "ENOENT") return null;
    // It ends with 4 when one of the pictures has no symbol, and has told of all the others.
    const told = error instanceof Error && "status" in error && error.status === 4;
    if (!told || !("stdout" in error)) throw error;
    xml = String(error.stdout);
  }
  const texts = new Map<string, string>();
  for (const [, file, inside] of xml.matchAll(/<source href='([^']+)'>([\s\S]*?)<\/source>/g)) {
    const text = /<data[^>]*><!\[CDATA\[([\s\S]*?)\]\]><\/data>/.exec(inside ?? "")?.[1];
    if (file && text !== undefined) texts.set(file, text);
  }
  return texts;
}
