import { AsyncLocalStorage } from "node:async_hooks";
import type { Message } from "../protocol/message.js";
import type { OutputQueue } from "./output-queue.js";

/** One execution of one cell. Whatever the cell leaves running still belongs to it. */
export interface Run {
  readonly serial: number;
  readonly request: Message;
  readonly output: OutputQueue;
  readonly silent: boolean;
  readonly allowsInput: boolean;
  /** Set when the user interrupted this run: what it still has in flight stops when it next looks. */
  stopped: boolean;
}

const owner = new AsyncLocalStorage<Run>();
let latest: Run | undefined;

/** Runs `work` so that all it prints and shows, now or later, goes to this run. */
export function runAs<T>(run: Run, work: () => T): T {
  latest = run;
  return owner.run(run, work);
}

/** The run that the present code belongs to; the latest one where that cannot be known. */
export function presentRun(): Run | undefined {
  return owner.getStore() ?? latest;
}
