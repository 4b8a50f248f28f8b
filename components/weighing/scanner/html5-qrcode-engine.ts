import type { Html5Qrcode } from "html5-qrcode";
import { CameraError, cameraTrouble, type ScanEngine } from "./scan-engine";

const FRAMES_PER_SECOND = 10;
let madeIds = 0;

/** html5-qrcode as the engine. Its 107 KB travel only when the camera is started for the first time. */
export function html5QrcodeEngine(): ScanEngine {
  let running: Html5Qrcode | null = null;
  let host: HTMLElement | null = null;

  return {
    async start(element, onRead) {
      if (!("mediaDevices" in navigator)) {
        throw new CameraError(window.isSecureContext ? "absent" : "insecure");
      }
      const library = await import("html5-qrcode").catch((error: unknown) => {
        throw new CameraError("failed", error);
      });
      // The library finds its place by id and leaves its own elements in it: it gets one to spoil.
      host = document.createElement("div");
      host.id = `scan-${(madeIds += 1)}`;
      element.replaceChildren(host);
      const scanner = new library.Html5Qrcode(host.id, {
        verbose: false,
        formatsToSupport: [library.Html5QrcodeSupportedFormats.QR_CODE],
      });
      try {
        await scanner.start(
          { facingMode: "environment" },
          { fps: FRAMES_PER_SECOND, disableFlip: true },
          (text) => onRead(text),
          // Called for every frame without a symbol, which is most of them.
          () => undefined,
        );
      } catch (error) {
        host.remove();
        throw new CameraError(cameraTrouble(error), error);
      }
      running = scanner;
    },

    async stop() {
      const scanner = running;
      running = null;
      if (scanner) {
        await scanner.stop();
        scanner.clear();
      }
      host?.remove();
      host = null;
    },
  };
}
