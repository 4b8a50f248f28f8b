import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { startFrameLoop } from "@/components/scanner/frame-loop";

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

const video = { videoWidth: 640, videoHeight: 480, readyState: 4 };

describe("the frame loop", () => {
  it("has one frame read at a time, however long that takes", async () => {
    let [busy, most, reads] = [0, 0, 0];
    const stop = startFrameLoop(
      video,
      () => undefined,
      async () => {
        busy += 1;
        most = Math.max(most, busy);
        await new Promise((resolve) => setTimeout(resolve, 500));
        busy -= 1;
        reads += 1;
      },
    );
    await vi.advanceTimersByTimeAsync(5000);
    stop();
    expect(most).toBe(1);
    expect(reads).toBeGreaterThan(5);
    expect(reads).toBeLessThan(10);
  });

  it("goes on after a reading that failed, and ends when it is told to", async () => {
    let reads = 0;
    const stop = startFrameLoop(
      video,
      () => undefined,
      () => {
        reads += 1;
        return Promise.reject(new Error("died"));
      },
    );
    await vi.advanceTimersByTimeAsync(1000);
    expect(reads).toBeGreaterThan(3);
    stop();
    const until = reads;
    await vi.advanceTimersByTimeAsync(1000);
    expect(reads).toBe(until);
  });

  it("takes frames as they come where the browser tells of them, and none that is not there yet", async () => {
    let [reads, asked] = [0, 0];
    const waits: (() => void)[] = [];
    const telling = {
      ...video,
      readyState: 1,
      requestVideoFrameCallback: (callback: VideoFrameRequestCallback) => {
        waits.push(() => callback(0, {} as VideoFrameCallbackMetadata));
        return (asked += 1);
      },
      cancelVideoFrameCallback: () => undefined,
    };
    const stop = startFrameLoop(
      telling,
      () => undefined,
      () => {
        reads += 1;
        return Promise.resolve();
      },
    );
    await vi.advanceTimersByTimeAsync(1000);
    expect(asked).toBe(1);
    waits.shift()?.();
    await vi.advanceTimersByTimeAsync(1000);
    expect(reads).toBe(0);
    telling.readyState = 4;
    waits.shift()?.();
    await vi.advanceTimersByTimeAsync(1000);
    expect(reads).toBe(1);
    stop();
  });
});
