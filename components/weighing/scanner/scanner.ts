import { CameraError, type CameraTrouble, type ScanEngine } from "./scan-engine";

export type ScannerState =
  | { kind: "off" }
  | { kind: "starting" }
  | { kind: "on" }
  | { kind: "trouble"; trouble: CameraTrouble };

/**
 * The one owner of the camera. It lives outside React: a component only says which element should show the
 * picture, or none, as often as it likes; starts and stops run one after another until what runs is what
 * was asked for last. So a double mount makes one picture, and leaving the page lets the camera go.
 */
export class Scanner {
  private readonly engine: ScanEngine;
  private readonly listeners = new Set<() => void>();
  private state: ScannerState = { kind: "off" };
  private wanted: HTMLElement | null = null;
  private running: HTMLElement | null = null;
  private hidden = false;
  private working = false;
  private lastRead: string | null = null;
  private onRead: (text: string) => void = () => undefined;

  constructor(engine: ScanEngine) {
    this.engine = engine;
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
    this.wanted = element;
    void this.reconcile();
  }

  /** Let the camera go. */
  hide(): void {
    this.wanted = null;
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

  private async reconcile(): Promise<void> {
    if (this.working) return;
    this.working = true;
    try {
      for (;;) {
        const target = this.hidden ? null : this.wanted;
        if (target === this.running) return;
        if (this.running) await this.stopNow();
        else if (target) await this.startNow(target);
      }
    } finally {
      this.working = false;
    }
  }

  private async startNow(element: HTMLElement): Promise<void> {
    this.set({ kind: "starting" });
    try {
      await this.engine.start(element, (text) => this.read(text));
      this.running = element;
      this.set({ kind: "on" });
    } catch (error) {
      if (this.wanted === element) this.wanted = null;
      this.set({
        kind: "trouble",
        trouble: error instanceof CameraError ? error.trouble : "failed",
      });
    }
  }

  private async stopNow(): Promise<void> {
    this.running = null;
    try {
      await this.engine.stop();
      this.set({ kind: "off" });
    } catch {
      // The engine lost the camera by itself (unplugged, taken by the system): it is gone either way.
      this.set({ kind: "trouble", trouble: "failed" });
    }
  }

  private read(text: string): void {
    if (text === this.lastRead) return;
    this.lastRead = text;
    this.onRead(text);
  }

  private set(state: ScannerState): void {
    this.state = state;
    for (const listener of this.listeners) listener();
  }
}
