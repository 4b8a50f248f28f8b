/**
 * First module of every worker thread: makes TypeScript loadable in it (tsx leaves threads alone when it is
 * only named on the command line), then loads the worker that was asked for.
 */
import { workerData } from "node:worker_threads";
import { register } from "tsx/esm/api";

register();
await import(workerData.source);
