/** What reads symbols from a picture. One interface, so that the engine can change without the screens. */

/**
 * live: soon, another frame follows; photo: everything that could help, there is only this picture; glance: the
 * first few things, for a picture so large that all of them would take a minute.
 */
export type Effort = "live" | "photo" | "glance";

export interface ScanEngine {
  readonly name: "wasm" | "native" | "html5-qrcode";
  /**
   * Reads the picture's symbol.
   *
   * @returns its text, whoever made it; null when none was read
   * @throws when the engine itself is broken and must not be asked again
   */
  decode(picture: HTMLCanvasElement, effort: Effort): Promise<string | null>;
  /** Gives back what it holds. */
  close(): void;
}

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
  /** The picture is there and nothing that reads it: no engine could be fetched, or none reads its test picture. */
  | "unread"
  | "failed";

export class CameraError extends Error {
  readonly trouble: CameraTrouble;

  constructor(trouble: CameraTrouble, cause?: unknown) {
    super(`camera ${trouble}`, { cause });
    this.name = "CameraError";
    this.trouble = trouble;
  }
}

/** The browser's DOMException names (Media Capture and Streams), in the words of this module. */
export function cameraTrouble(error: unknown): CameraTrouble {
  const text = error instanceof Error ? `${error.name} ${error.message}` : String(error);
  if (/NotAllowedError|PermissionDenied|SecurityError/i.test(text)) return "refused";
  if (/NotFoundError|DevicesNotFound|OverconstrainedError|no camera/i.test(text)) return "absent";
  if (/NotReadableError|TrackStartError|AbortError/i.test(text)) return "busy";
  return "failed";
}
