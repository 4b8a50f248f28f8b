/** `npm run verify`: format, lint, types, unit tests, architecture; under a minute with warm caches. */
import { installIfNeeded } from "../../lib/cli/install.mjs";
import { endWithSignals } from "../../lib/cli/own-processes.mjs";
import { ROOT, close, runSteps } from "./steps.mjs";
import { verifySteps } from "./verify-steps.mjs";

const started = Date.now();
endWithSignals();
await installIfNeeded(ROOT);
process.exitCode = close(await runSteps(verifySteps(), 2), started);
