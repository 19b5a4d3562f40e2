import { existsSync } from "node:fs";
import { join } from "node:path";
import { Worker } from "node:worker_threads";
import type { PlotSpec } from "./plot-spec.js";

interface Waiting {
  readonly resolve: (png: Uint8Array | undefined) => void;
}

let worker: Worker | undefined;
let orders = 0;
const waiting = new Map<number, Waiting>();

/**
 * Draws a plot as a PNG in another thread.
 *
 * @returns undefined when the picture could not be drawn: a figure then shows its live plot and its text.
 */
export function drawPicture({ data, layout }: PlotSpec): Promise<Uint8Array | undefined> {
  const thread = startedWorker();
  const id = ++orders;
  return new Promise((resolve) => {
    waiting.set(id, { resolve });
    // A program may end while the thread idles, but not while a picture is due.
    thread.ref();
    thread.postMessage({ id, data, layout });
  });
}

/** Starts the thread ahead of the first figure; returns at once. */
export function warmPictures(): void {
  startedWorker();
}

function startedWorker(): Worker {
  if (worker) return worker;
  const started = new Worker(workerFile());
  started.on("message", ({ id, png }: { id: number; png?: Uint8Array }) => settle(id, png));
  started.on("error", () => giveUp());
  started.on("exit", () => giveUp());
  // After the listeners, because adding one makes a program wait for the thread again.
  started.unref();
  worker = started;
  return started;
}

function settle(id: number, png: Uint8Array | undefined): void {
  waiting.get(id)?.resolve(png);
  waiting.delete(id);
  if (waiting.size === 0) worker?.unref();
}

function giveUp(): void {
  worker = undefined;
  for (const id of [...waiting.keys()]) settle(id, undefined);
}

/** The built worker stands beside this file; when the sources themselves run (in tests), it stands in the build. */
function workerFile(): string {
  const beside = join(__dirname, "picture-worker.js");
  return existsSync(beside)
    ? beside
    : join(__dirname, "..", "..", "dist", "kernel-helpers", "figures", "picture-worker.js");
}
