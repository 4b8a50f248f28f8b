import { listCameras, openCamera, rememberCamera } from "./camera";
import { chooseEngine } from "./choose-engine";
import { endFeedback, giveFeedback } from "./feedback";
import { canvasOf, drawFrame, startFrameLoop } from "./frame-loop";
import { Scanner } from "./scanner";

let made: Scanner | null = null;

/** The page's one scanner. Made in the browser when the camera is first asked for. */
export function sharedScanner(): Scanner {
  if (made) return made;
  const canvas = canvasOf(1, 1);
  const scanner = new Scanner({
    openCamera,
    listCameras,
    rememberCamera,
    chooseEngine,
    giveFeedback,
    endFeedback,
    startFrames: (video, read) =>
      startFrameLoop(
        video,
        () => drawFrame(canvas, video),
        () => read(canvas),
      ),
  });
  const look = () => scanner.pageHidden(document.visibilityState === "hidden");
  document.addEventListener("visibilitychange", look);
  // A page that goes into the browser's memory and comes back from there gets no other sign.
  window.addEventListener("pagehide", () => scanner.pageHidden(true));
  window.addEventListener("pageshow", look);
  made = scanner;
  return scanner;
}
