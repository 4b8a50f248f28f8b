/** What reads tags from the camera. One interface, so that the engine can change without the screens. */

/** Why there is no picture. */
export type CameraTrouble =
  /** The person or a policy refused the camera. */
  | "refused"
  /** The device has no camera. */
  | "absent"
  /** Another program holds it. */
  | "busy"
  /** Browsers give the camera to https pages only. */
  | "insecure"
  | "failed";

export class CameraError extends Error {
  readonly trouble: CameraTrouble;

  constructor(trouble: CameraTrouble, cause?: unknown) {
    super(`camera ${trouble}`, { cause });
    this.name = "CameraError";
    this.trouble = trouble;
  }
}

export interface ScanEngine {
  /**
   * Shows the rear camera's picture in the element and calls `onRead` with the text of every symbol seen,
   * many times a second for as long as it is in view.
   *
   * @throws CameraError
   */
  start(element: HTMLElement, onRead: (text: string) => void): Promise<void>;
  /** Lets the camera go and empties the element. Harmless when it is not running. */
  stop(): Promise<void>;
}

/** The browser's DOMException names (Media Capture and Streams), in the words of this module. */
export function cameraTrouble(error: unknown): CameraTrouble {
  const text = error instanceof Error ? `${error.name} ${error.message}` : String(error);
  if (/NotAllowedError|PermissionDenied|SecurityError/i.test(text)) return "refused";
  if (/NotFoundError|DevicesNotFound|OverconstrainedError|no camera/i.test(text)) return "absent";
  if (/NotReadableError|TrackStartError|AbortError/i.test(text)) return "busy";
  return "failed";
}
