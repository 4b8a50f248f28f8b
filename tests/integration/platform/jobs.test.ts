import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { instant } from "@/lib/core/time";
import { repeat, underLease } from "@/lib/platform/jobs";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";

let scheme: TestScheme;
beforeEach(() => {
  scheme = newScheme();
});
afterEach(() => scheme.close());

const at = (now: number) => () => instant(now);
const lease = () =>
  scheme.db.reader.client.prepare("select * from job_leases").get() as
    Record<string, unknown> | undefined;

describe("a lease", () => {
  it("lets one process in at a time", async () => {
    let finish = (): void => undefined;
    const first = underLease(
      scheme.db,
      "mail",
      1000,
      at(NOON),
      () =>
        new Promise<string>((done) => {
          finish = () => done("sent 1");
        }),
      "one",
    );
    const other = vi.fn(() => Promise.resolve("sent 1"));
    expect(await underLease(scheme.db, "mail", 1000, at(NOON + 999), other, "two")).toBe(false);
    expect(other).not.toHaveBeenCalled();
    finish();
    expect(await first).toBe(true);
    expect(lease()).toMatchObject({ holder: "one", last_finished_at: NOON, last_result: "sent 1" });
    expect(await underLease(scheme.db, "mail", 1000, at(NOON), other, "two")).toBe(true);
    expect(other).toHaveBeenCalledOnce();
  });

  it("of a process that died runs out", async () => {
    void underLease(
      scheme.db,
      "mail",
      1000,
      at(NOON),
      () => new Promise<string>(() => undefined),
      "dead",
    );
    const next = () => Promise.resolve("done");
    expect(await underLease(scheme.db, "mail", 1000, at(NOON + 999), next, "two")).toBe(false);
    expect(await underLease(scheme.db, "mail", 1000, at(NOON + 1000), next, "two")).toBe(true);
  });

  it("is given back by work that fails, and the failure comes through", async () => {
    const fails = () => Promise.reject(new Error("no network"));
    await expect(underLease(scheme.db, "mail", 1000, at(NOON), fails, "one")).rejects.toThrow(
      "no network",
    );
    expect(lease()).toMatchObject({ until: NOON, last_result: "failed" });
  });

  it("is not given back for another who has it by now", async () => {
    let finish = (): void => undefined;
    const slow = underLease(
      scheme.db,
      "mail",
      1000,
      at(NOON),
      () =>
        new Promise<string>((done) => {
          finish = () => done("late");
        }),
      "slow",
    );
    void underLease(
      scheme.db,
      "mail",
      5000,
      at(NOON + 1000),
      () => new Promise<string>(() => undefined),
      "two",
    );
    finish();
    await slow;
    expect(lease()).toMatchObject({ holder: "two", until: NOON + 6000, last_result: null });
  });
});

describe("a timer", () => {
  it("goes on after a failure, and stops when told", async () => {
    vi.useFakeTimers();
    const quiet = vi.spyOn(process.stderr, "write").mockImplementation(() => true);
    let calls = 0;
    const stop = repeat("test", 10, () => {
      calls += 1;
      return calls === 1 ? Promise.reject(new Error("once")) : Promise.resolve();
    });
    await vi.advanceTimersByTimeAsync(35);
    expect(calls).toBe(3);
    expect(quiet).toHaveBeenCalledOnce();
    stop();
    await vi.advanceTimersByTimeAsync(100);
    expect(calls).toBe(3);
    quiet.mockRestore();
    vi.useRealTimers();
  });
});
