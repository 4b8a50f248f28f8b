/** The camera's stream and its one owner: which camera, its lamp, and when the system takes it away. */
import { readSetting, writeSetting } from "./remembered";
import { CameraError, cameraTrouble } from "./scan-engine";

const CAMERA_SETTING = "camera";
/** A phone that takes a call mutes the track for a moment; longer than this it does not come back by itself. */
const MUTED_MS = 2500;
/** Enough for a tag at arm's length; more pixels cost more time than they read. */
const WANTED = { width: { ideal: 1280 }, height: { ideal: 720 } } as const;

/** A running camera. */
export interface OpenCamera {
  readonly video: HTMLVideoElement;
  readonly deviceId: string | null;
  /** Whether its lamp is lit; null when it has none that can be switched. */
  readonly lamp: boolean | null;
  setLamp(on: boolean): Promise<void>;
  /** Called once, when the system took the camera away. */
  onLost(lost: () => void): void;
  close(): void;
}

/** What capabilities and constraints of a track say about its lamp (W3C image capture), beyond the DOM's types. */
type WithTorch = { torch?: boolean };

async function streamOf(deviceId: string | null): Promise<MediaStream> {
  const media = navigator.mediaDevices;
  if (deviceId !== null) {
    try {
      return await media.getUserMedia({
        video: { ...WANTED, deviceId: { exact: deviceId } },
        audio: false,
      });
    } catch (error) {
      // Unplugged, or the browser gave its cameras new names: then any camera is better than none.
      if (cameraTrouble(error) !== "absent") throw error;
      writeSetting(CAMERA_SETTING, null);
    }
  }
  // By facing and not by name: labels are in the phone's language, and empty before the first permission.
  return media.getUserMedia({
    video: { ...WANTED, facingMode: { ideal: "environment" } },
    audio: false,
  });
}

/**
 * Starts the camera and shows its picture in the element.
 *
 * @param deviceId which one; null for the one that was chosen last, else the rear one
 * @throws CameraError
 */
export async function openCamera(
  element: HTMLElement,
  deviceId: string | null,
): Promise<OpenCamera> {
  if (!("mediaDevices" in navigator)) {
    throw new CameraError(window.isSecureContext ? "absent" : "insecure");
  }
  let stream: MediaStream;
  try {
    stream = await streamOf(deviceId ?? readSetting(CAMERA_SETTING));
  } catch (error) {
    throw new CameraError(cameraTrouble(error), error);
  }
  const stop = () => {
    for (const each of stream.getTracks()) each.stop();
  };
  const track = stream.getVideoTracks()[0];
  if (!track) {
    stop();
    throw new CameraError("absent");
  }
  const video = document.createElement("video");
  video.muted = true;
  // Without it an iPhone takes the whole screen for the picture.
  video.playsInline = true;
  video.srcObject = stream;
  element.replaceChildren(video);
  try {
    await video.play();
  } catch (error) {
    stop();
    video.srcObject = null;
    video.remove();
    throw new CameraError("failed", error);
  }
  return new RunningCamera(video, track, stop);
}

class RunningCamera implements OpenCamera {
  readonly video: HTMLVideoElement;
  private readonly track: MediaStreamTrack;
  private readonly stop: () => void;
  private lit: boolean | null;
  private lost: (() => void) | null = null;
  private mutedTimer: ReturnType<typeof setTimeout> | undefined;

  constructor(video: HTMLVideoElement, track: MediaStreamTrack, stop: () => void) {
    this.video = video;
    this.track = track;
    this.stop = stop;
    // Not every browser has getCapabilities (Firefox on a desk has not).
    const able =
      "getCapabilities" in track && (track.getCapabilities() as WithTorch).torch === true;
    this.lit = able ? false : null;
    track.addEventListener("ended", this.tellLost);
    track.addEventListener("mute", this.muted);
    track.addEventListener("unmute", this.unmuted);
  }

  get deviceId(): string | null {
    return this.track.getSettings().deviceId ?? null;
  }

  get lamp(): boolean | null {
    return this.lit;
  }

  async setLamp(on: boolean): Promise<void> {
    if (this.lit === null) return;
    const torch = { torch: on } as MediaTrackConstraintSet & WithTorch;
    try {
      await this.track.applyConstraints({ advanced: [torch] });
      this.lit = on;
    } catch {
      // It said that it has one and cannot switch it: then there is no button for it any more.
      this.lit = null;
    }
  }

  onLost(lost: () => void): void {
    this.lost = lost;
    // Taken away while it was starting: the event has been and gone.
    if (this.track.readyState === "ended") queueMicrotask(this.tellLost);
  }

  close(): void {
    this.lost = null;
    clearTimeout(this.mutedTimer);
    this.track.removeEventListener("ended", this.tellLost);
    this.track.removeEventListener("mute", this.muted);
    this.track.removeEventListener("unmute", this.unmuted);
    this.stop();
    // A video that keeps its stream keeps the camera's light on in some browsers.
    this.video.srcObject = null;
    this.video.remove();
  }

  private readonly tellLost = (): void => {
    const lost = this.lost;
    this.lost = null;
    clearTimeout(this.mutedTimer);
    lost?.();
  };

  private readonly muted = (): void => {
    this.mutedTimer = setTimeout(this.tellLost, MUTED_MS);
  };

  private readonly unmuted = (): void => clearTimeout(this.mutedTimer);
}

/** The cameras of this device; their names are empty until the camera was allowed once. */
export async function listCameras(): Promise<string[]> {
  const devices = await navigator.mediaDevices.enumerateDevices();
  return devices.filter(({ kind }) => kind === "videoinput").map(({ deviceId }) => deviceId);
}

/** From now on this camera, on this device. */
export function rememberCamera(deviceId: string): void {
  writeSetting(CAMERA_SETTING, deviceId);
}
