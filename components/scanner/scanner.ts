import type { OpenCamera } from "./camera";
import type { Verdict } from "./feedback";
import { CameraError, type CameraTrouble, type Effort, type ScanEngine } from "./scan-engine";

export type ScannerState =
  | { kind: "off" }
  | { kind: "starting" }
  | {
      kind: "on";
      /** null while the first engine is still being fetched and tested. */
      engine: ScanEngine["name"] | null;
      /** Whether the lamp is lit; null where there is none. */
      lamp: boolean | null;
      /** How many cameras there are to choose from. */
      cameras: number;
      /** What became of the last symbol, for a moment. */
      mark: Verdict | null;
    }
  | { kind: "trouble"; trouble: CameraTrouble };

/** What the scanner is made of; tests put their own in. */
export type ScannerParts = {
  openCamera(element: HTMLElement, deviceId: string | null): Promise<OpenCamera>;
  listCameras(): Promise<string[]>;
  rememberCamera(deviceId: string): void;
  /** @throws CameraError "unread" when none is left */
  chooseEngine(broken: ReadonlySet<ScanEngine["name"]>): Promise<ScanEngine>;
  /** Begins to hand over frames, one at a time; returns what ends it. */
  startFrames(
    video: HTMLVideoElement,
    read: (frame: HTMLCanvasElement) => Promise<void>,
  ): () => void;
  giveFeedback(verdict: Verdict): void;
  endFeedback(): void;
};

type Wish = { element: HTMLElement; deviceId: string | null };
type Running = { wish: Wish; camera: OpenCamera; endFrames: () => void };

/** How long a mark stays on the picture. */
const MARK_MS = 1200;
/** Nobody scanned for so long: the engine's memory is given back. */
const IDLE_MS = 60_000;
/** A camera that is lost so often in so short a time is not asked for again by itself. */
const MOST_LOSSES = 3;
const LOSSES_MS = 20_000;

/**
 * The one owner of the camera. It lives outside React: a component only says which element should show the
 * picture, or none, as often as it likes; starts and stops run one after another until what runs is what
 * was asked for last. So a double mount makes one picture, and leaving the page lets the camera go.
 */
export class Scanner {
  private readonly parts: ScannerParts;
  private readonly listeners = new Set<() => void>();
  private state: ScannerState = { kind: "off" };
  private wanted: Wish | null = null;
  private running: Running | null = null;
  private hidden = false;
  private working = false;
  private lastRead: string | null = null;
  private onRead: (text: string) => void = () => undefined;
  private engine: Promise<ScanEngine> | null = null;
  private readonly broken = new Set<ScanEngine["name"]>();
  private losses: number[] = [];
  private markTimer: ReturnType<typeof setTimeout> | undefined;
  private idleTimer: ReturnType<typeof setTimeout> | undefined;

  constructor(parts: ScannerParts) {
    this.parts = parts;
  }

  readonly current = (): ScannerState => this.state;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** Who is told what was read; the same text is told once, until another one was read. */
  listen(onRead: (text: string) => void): void {
    this.onRead = onRead;
  }

  /** Show the camera's picture in this element. */
  show(element: HTMLElement): void {
    this.losses = [];
    this.wanted = { element, deviceId: this.wanted?.deviceId ?? null };
    void this.reconcile();
  }

  /** Let the camera go. */
  hide(): void {
    this.wanted = null;
    this.parts.endFeedback();
    if (this.state.kind === "trouble") this.set({ kind: "off" });
    void this.reconcile();
  }

  /** The same tag may be read again, as after the form was emptied by hand. */
  forget(): void {
    this.lastRead = null;
  }

  /** A page that nobody sees holds no camera (some phones never give it back otherwise). */
  pageHidden(hidden: boolean): void {
    this.hidden = hidden;
    void this.reconcile();
  }

  /** The next one of several cameras; it is the one that this device starts with from now on. */
  async nextCamera(): Promise<void> {
    const { running } = this;
    if (!running) return;
    const all = await this.parts.listCameras();
    const at = all.indexOf(running.camera.deviceId ?? "");
    const next = all[(at + 1) % all.length];
    if (!next || !this.wanted || next === running.camera.deviceId) return;
    this.parts.rememberCamera(next);
    this.wanted = { element: this.wanted.element, deviceId: next };
    void this.reconcile();
  }

  async setLamp(on: boolean): Promise<void> {
    const { running } = this;
    await running?.camera.setLamp(on);
    if (running && running === this.running) this.patch({ lamp: running.camera.lamp });
  }

  /** The screen says what the text turned out to be: sound, buzz and mark follow. */
  settle(verdict: Verdict): void {
    this.parts.giveFeedback(verdict);
    clearTimeout(this.markTimer);
    this.patch({ mark: verdict });
    this.markTimer = setTimeout(() => this.patch({ mark: null }), MARK_MS);
  }

  /**
   * Reads a picture with the engine of the camera, or with the next one if that breaks.
   *
   * @throws CameraError "unread" when there is no engine
   */
  async decode(picture: HTMLCanvasElement, effort: Effort): Promise<string | null> {
    for (;;) {
      const choosing = this.choose();
      const engine = await choosing;
      try {
        return await engine.decode(picture, effort);
      } catch {
        // Whatever it was (a worker that died, a driver that gave up): it is not asked again.
        engine.close();
        this.broken.add(engine.name);
        if (this.engine === choosing) this.engine = null;
      } finally {
        this.restIdle();
      }
    }
  }

  /** Tells what a picture held, also when it is what was told last: it was asked for. */
  tell(text: string): void {
    this.lastRead = text;
    this.onRead(text);
  }

  private choose(): Promise<ScanEngine> {
    clearTimeout(this.idleTimer);
    if (this.engine) return this.engine;
    const choosing = this.parts.chooseEngine(this.broken);
    this.engine = choosing;
    choosing.catch(() => {
      // Without a network now is not without one for ever: the next start asks for all of them again.
      if (this.engine === choosing) this.engine = null;
      this.broken.clear();
    });
    return choosing;
  }

  private restIdle(): void {
    clearTimeout(this.idleTimer);
    this.idleTimer = setTimeout(() => {
      if (this.running) return;
      const { engine } = this;
      this.engine = null;
      void engine?.then((each) => each.close()).catch(() => undefined);
    }, IDLE_MS);
  }

  private async reconcile(): Promise<void> {
    if (this.working) return;
    this.working = true;
    try {
      for (;;) {
        const target = this.hidden ? null : this.wanted;
        const shown = this.running?.wish ?? null;
        if (target?.element === shown?.element && target?.deviceId === shown?.deviceId) return;
        if (this.running) this.stopNow();
        else if (target) await this.startNow(target);
      }
    } finally {
      this.working = false;
    }
  }

  private async startNow(wish: Wish): Promise<void> {
    this.set({ kind: "starting" });
    // Fetched while the camera warms up.
    const choosing = this.choose();
    try {
      const camera = await this.parts.openCamera(wish.element, wish.deviceId);
      const endFrames = this.parts.startFrames(camera.video, (frame) => this.readFrame(frame));
      const running = { wish, camera, endFrames };
      this.running = running;
      camera.onLost(() => this.lost(running));
      this.set({ kind: "on", engine: null, lamp: camera.lamp, cameras: 1, mark: null });
      choosing.then(
        ({ name }) => this.running === running && this.patch({ engine: name }),
        () => this.giveUp("unread"),
      );
      this.parts.listCameras().then(
        ({ length }) => this.running === running && this.patch({ cameras: length }),
        () => undefined,
      );
    } catch (error) {
      choosing.catch(() => undefined);
      this.giveUp(error instanceof CameraError ? error.trouble : "failed", wish);
    }
  }

  /** Says why and does not try again by itself. */
  private giveUp(trouble: CameraTrouble, wish: Wish | null = this.running?.wish ?? null): void {
    if (this.wanted === wish) this.wanted = null;
    if (this.running) this.stopNow();
    this.set({ kind: "trouble", trouble });
  }

  private stopNow(): void {
    const { running } = this;
    this.running = null;
    running?.endFrames();
    running?.camera.close();
    this.restIdle();
    this.set({ kind: "off" });
  }

  private lost(running: Running): void {
    if (this.running !== running) return;
    const now = Date.now();
    this.losses = [...this.losses.filter((at) => now - at < LOSSES_MS), now];
    if (this.losses.length > MOST_LOSSES) {
      this.giveUp("busy");
      return;
    }
    this.stopNow();
    void this.reconcile();
  }

  private async readFrame(frame: HTMLCanvasElement): Promise<void> {
    const { running } = this;
    const text = await this.decode(frame, "live");
    // What is read after the camera was let go is not told: the person has turned away.
    if (text === null || running === null || running !== this.running || text === this.lastRead) {
      return;
    }
    this.tell(text);
  }

  private patch(change: Partial<Extract<ScannerState, { kind: "on" }>>): void {
    if (this.state.kind === "on") this.set({ ...this.state, ...change });
  }

  private set(state: ScannerState): void {
    this.state = state;
    for (const listener of this.listeners) listener();
  }
}
