/** What a person hears and feels: one pair for a tag that was read, another for one that is not known. */
import { readSetting, writeSetting } from "./remembered";

/** What became of what the camera saw. */
export type Verdict = "read" | "unknown";

type Tone = { hertz: number; fromMs: number; ms: number };

/** Up and short for yes; low, twice, for no. The two differ in height, number and length. */
const TONES: Record<Verdict, readonly Tone[]> = {
  read: [
    { hertz: 880, fromMs: 0, ms: 70 },
    { hertz: 1320, fromMs: 70, ms: 90 },
  ],
  unknown: [
    { hertz: 240, fromMs: 0, ms: 130 },
    { hertz: 200, fromMs: 190, ms: 190 },
  ],
};
const BUZZ: Record<Verdict, number[]> = { read: [60], unknown: [70, 60, 70] };
const LOUDNESS = 0.25;
const SOUND_SETTING = "sound";

let context: AudioContext | null = null;

export const isQuiet = (): boolean => readSetting(SOUND_SETTING) === "off";

export function setQuiet(quiet: boolean): void {
  writeSetting(SOUND_SETTING, quiet ? "off" : null);
}

/**
 * Makes the sound and the buzz. The camera was started by a press, and a page that holds a camera may sound;
 * where a browser thinks otherwise it stays silent, and mark and words say the same.
 */
export function giveFeedback(verdict: Verdict): void {
  if ("vibrate" in navigator) navigator.vibrate(BUZZ[verdict]);
  if (isQuiet() || !("AudioContext" in globalThis)) return;
  context ??= new AudioContext();
  const audio = context;
  // After a call or a sleep it is suspended; a promise that is refused means silence, as said above.
  if (audio.state !== "running") void audio.resume().catch(() => undefined);
  const start = audio.currentTime + 0.01;
  for (const { hertz, fromMs, ms } of TONES[verdict]) {
    const [from, until] = [start + fromMs / 1000, start + (fromMs + ms) / 1000];
    const tone = audio.createOscillator();
    const volume = audio.createGain();
    tone.type = "triangle";
    tone.frequency.value = hertz;
    volume.gain.setValueAtTime(0, from);
    // Ramps of 8 ms: a tone that starts or ends at once clicks.
    volume.gain.linearRampToValueAtTime(LOUDNESS, from + 0.008);
    volume.gain.setValueAtTime(LOUDNESS, until - 0.008);
    volume.gain.linearRampToValueAtTime(0, until);
    tone.connect(volume).connect(audio.destination);
    tone.onended = () => volume.disconnect();
    tone.start(from);
    tone.stop(until);
  }
}

/** Lets the sound device go; phones keep it awake otherwise. */
export function endFeedback(): void {
  const audio = context;
  context = null;
  if (audio) void audio.close().catch(() => undefined);
}
