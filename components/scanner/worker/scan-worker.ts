/** The scanner's worker: gets pictures, answers with texts. Bundled by lib/cli/build-scanner.mjs. */
import { startDecoder } from "./decoder";
import { greyOf } from "./grey";
import type { WorkerAnswer, WorkerRequest } from "./messages";
import { passReader } from "./read-passes";

/** What of a dedicated worker's scope is used; the project's types are those of pages. */
type Scope = {
  postMessage(answer: WorkerAnswer): void;
  onmessage: ((event: MessageEvent<WorkerRequest>) => void) | null;
};
const scope = globalThis as unknown as Scope;

async function start(): Promise<void> {
  const answer = await fetch("/scanner/zxing_reader.wasm");
  if (!answer.ok) throw new Error(`zxing_reader.wasm: ${answer.status}`);
  const read = passReader(await startDecoder(await answer.arrayBuffer()), () => performance.now());
  scope.onmessage = ({ data }) => {
    const { id, effort, width, height, pixels } = data;
    const text = read(greyOf(new Uint8ClampedArray(pixels), width, height), effort);
    scope.postMessage({ kind: "read", id, text });
  };
  scope.postMessage({ kind: "ready" });
}

start().catch((error: unknown) => {
  scope.postMessage({
    kind: "broken",
    why: error instanceof Error ? `${error.name}: ${error.message}` : String(error),
  });
});
