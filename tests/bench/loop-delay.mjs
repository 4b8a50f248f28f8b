/** Preloaded into a measured server: writes the longest pause of its main thread to LOOP_DELAY_FILE. */
import fs from "node:fs";
import { monitorEventLoopDelay } from "node:perf_hooks";
import { isMainThread } from "node:worker_threads";

const file = process.env.LOOP_DELAY_FILE;
if (isMainThread && file) {
  const delay = monitorEventLoopDelay({ resolution: 2 });
  delay.enable();
  setInterval(() => {
    // A reset is asked for by removing the file.
    if (!fs.existsSync(file)) delay.reset();
    fs.writeFileSync(
      file,
      JSON.stringify({ maxMs: delay.max / 1e6, p99Ms: delay.percentile(99) / 1e6 }),
    );
  }, 200).unref();
}
