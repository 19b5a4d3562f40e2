import { existsSync } from "node:fs";
import { join } from "node:path";
import { Worker } from "node:worker_threads";
import type { PlotSpec } from "./plot-spec.js";

interface PendingPicture {
  readonly resolve: (png: Uint8Array | undefined) => void;
}

let worker: Worker | undefined;
let orders = 0;
const pending = new Map<number, PendingPicture>();

/**
 * Draws a plot as a PNG in a worker thread.
 *
 * @returns undefined when the picture could not be drawn; the figure then has its interactive plot and its text.
 */
export function drawPicture({ data, layout }: PlotSpec): Promise<Uint8Array | undefined> {
  const thread = startedWorker();
  const id = ++orders;
  return new Promise((resolve) => {
    pending.set(id, { resolve });
    // The program may end while the thread is idle, but not while a picture is pending.
    thread.ref();
    thread.postMessage({ id, data, layout });
  });
}

/** Starts the worker before the first figure; returns at once. */
export function startPictureWorker(): void {
  startedWorker();
}

function startedWorker(): Worker {
  if (worker) return worker;
  const started = new Worker(workerFile());
  started.on("message", ({ id, png }: { id: number; png?: Uint8Array }) => settle(id, png));
  started.on("error", () => rejectAll());
  started.on("exit", () => rejectAll());
  // After the listeners, because adding one keeps the program alive.
  started.unref();
  worker = started;
  return started;
}

function settle(id: number, png: Uint8Array | undefined): void {
  pending.get(id)?.resolve(png);
  pending.delete(id);
  if (pending.size === 0) worker?.unref();
}

function rejectAll(): void {
  worker = undefined;
  for (const id of [...pending.keys()]) settle(id, undefined);
}

/** The built worker is beside this file; when the sources run (in tests), it is in the build. */
function workerFile(): string {
  const beside = join(__dirname, "picture-worker.js");
  return existsSync(beside)
    ? beside
    : join(__dirname, "..", "..", "dist", "kernel-helpers", "figures", "picture-worker.js");
}
