import type { ScanEngine } from "../scan-engine";

/**
 * html5-qrcode as the last engine: plain JavaScript, for a browser that runs no WebAssembly. Only its
 * decoder is taken; the camera is ours. Its 107 KB travel only when they are needed.
 */
export async function html5QrcodeEngine(): Promise<ScanEngine> {
  const [{ ZXingHtml5QrcodeDecoder }, { BaseLoggger, Html5QrcodeSupportedFormats }] =
    await Promise.all([
      import("html5-qrcode/esm/zxing-html5-qrcode-decoder"),
      import("html5-qrcode/esm/core"),
    ]);
  const decoder = new ZXingHtml5QrcodeDecoder(
    [Html5QrcodeSupportedFormats.QR_CODE],
    false,
    new BaseLoggger(false),
  );
  return {
    name: "html5-qrcode",
    async decode(picture) {
      try {
        const { text } = await decoder.decodeAsync(picture);
        return text === "" ? null : text;
      } catch {
        // Its way of saying that it saw no symbol, which is most frames; it has no other way of failing.
        return null;
      }
    },
    close: () => undefined,
  };
}
