/** A request's body as bytes, once, with a limit. */
import { AppError } from "@/lib/core/errors";

/**
 * @param most bytes
 * @throws AppError `too-large`, without reading the rest
 */
export async function readBody(request: Request, most: number): Promise<Buffer> {
  const announced = request.headers.get("content-length");
  if (announced !== null) {
    if (Number(announced) > most) throw new AppError("too-large");
    // The server reads no further than the announced length, so this cannot grow.
    const bytes = Buffer.from(await request.arrayBuffer());
    if (bytes.byteLength > most) throw new AppError("too-large");
    return bytes;
  }
  if (!request.body) return Buffer.alloc(0);
  const chunks: Uint8Array[] = [];
  let length = 0;
  const reader = request.body.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) return Buffer.concat(chunks, length);
    length += value.byteLength;
    if (length > most) {
      await reader.cancel();
      throw new AppError("too-large");
    }
    chunks.push(value);
  }
}
