import type { ScanEngine } from "../scan-engine";

/** W3C Shape Detection; TypeScript's DOM does not have it. */
type Detector = { detect(picture: CanvasImageSource): Promise<{ rawValue: string }[]> };
type DetectorClass = {
  new (options: { formats: string[] }): Detector;
  getSupportedFormats(): Promise<string[]>;
};

/**
 * The browser's own BarcodeDetector.
 *
 * @throws Error where there is none, or none for QR: some browsers have the class and no formats
 */
export async function nativeEngine(): Promise<ScanEngine> {
  const { BarcodeDetector } = globalThis as { BarcodeDetector?: DetectorClass };
  if (!BarcodeDetector) throw new Error("no BarcodeDetector");
  const formats = await BarcodeDetector.getSupportedFormats();
  if (!formats.includes("qr_code")) throw new Error("BarcodeDetector without QR");
  const detector = new BarcodeDetector({ formats: ["qr_code"] });
  return {
    name: "native",
    async decode(picture) {
      const [first] = await detector.detect(picture);
      return first?.rawValue ? first.rawValue : null;
    },
    close: () => undefined,
  };
}
