import { html5QrcodeEngine } from "./html5-qrcode-engine";
import { Scanner } from "./scanner";

let made: Scanner | null = null;

/** The page's one scanner. Made in the browser when the camera is first asked for. */
export function sharedScanner(): Scanner {
  if (made) return made;
  const scanner = new Scanner(html5QrcodeEngine());
  document.addEventListener("visibilitychange", () =>
    scanner.pageHidden(document.visibilityState === "hidden"),
  );
  window.addEventListener("pagehide", () => scanner.hide());
  made = scanner;
  return scanner;
}
