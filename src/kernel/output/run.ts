import { AsyncLocalStorage } from "node:async_hooks";
import type { Message } from "../protocol/message.js";
import type { OutputQueue } from "./output-queue.js";

/** One execution of one cell, including the work that it leaves running. */
export interface Run {
  readonly serial: number;
  readonly request: Message;
  readonly output: OutputQueue;
  readonly silent: boolean;
  readonly allowsInput: boolean;
  /** Set when this run is interrupted: its pending work stops at its next check. */
  stopped: boolean;
}

const owner = new AsyncLocalStorage<Run>();
let latest: Run | undefined;

/** Runs `work` so that everything it prints and displays, now or later, goes to this run. */
export function runAs<T>(run: Run, work: () => T): T {
  latest = run;
  return owner.run(run, work);
}

/** The run that the current code belongs to; the latest one when that is unknown. */
export function currentRun(): Run | undefined {
  return owner.getStore() ?? latest;
}
