import { currentRun, type Run } from "../output/run.js";
import { interruptFlag } from "../transport/interrupt-flag.js";
import { Interrupted } from "./cell-error.js";
import { flagName, stopName } from "./interrupt-checks.js";

/** Stops cells. The transport thread sets the flag; the kernel's thread acts on it, once. */
export interface Interrupts {
  /** Called before a cell runs; `stop` ends its await. */
  readonly begin: (run: Run, stop: () => void) => void;
  /** Called when the reply of the cell has been sent. */
  readonly end: () => void;
  /** Called with the number of an interrupt when the main thread receives it. */
  readonly received: (count: number) => void;
  /** Tracks work that a cell still awaits, so that the flag is reset once it has ended. */
  readonly track: <T>(work: Promise<T>) => Promise<T>;
}

export const interruptQuestion: unique symbol = Symbol.for("periodwise.interrupt") as never;

export function interrupts(shared: Int32Array): Interrupts {
  let handledCount = 0;
  let running: { readonly run: Run; readonly stop: () => void } | undefined;
  const lingering = new Set<Run>();

  const updateFlag = (): void => {
    handledCount = Atomics.load(shared, interruptFlag.countAt);
    Atomics.store(
      shared,
      interruptFlag.stateAt,
      lingering.size > 0 ? interruptFlag.lingering : interruptFlag.none,
    );
  };
  const shouldStop = (): boolean => {
    const state = shared[interruptFlag.stateAt];
    return (
      state === interruptFlag.fresh || (state === interruptFlag.lingering && currentRun()?.stopped === true)
    );
  };
  const stop = (): void => {
    if (shouldStop()) throw new Interrupted();
  };
  const hidden = { enumerable: false, configurable: true, writable: false };
  Object.defineProperty(globalThis, flagName, { ...hidden, value: shared });
  Object.defineProperty(globalThis, stopName, { ...hidden, value: stop });
  Object.defineProperty(globalThis, interruptQuestion, { ...hidden, value: shouldStop });

  return {
    begin: (run, stop) => {
      running = { run, stop };
      updateFlag();
    },
    end: () => {
      running = undefined;
      // An interrupt that arrives while a cell ends must not stop the next one.
      updateFlag();
    },
    received: (count) => {
      if (count <= handledCount) return;
      if (running !== undefined) {
        running.run.stopped = true;
        running.stop();
      }
      updateFlag();
    },
    track: (work) => {
      const run = currentRun();
      if (run === undefined) return work;
      lingering.add(run);
      return work.finally(() => {
        lingering.delete(run);
        if (shared[interruptFlag.stateAt] === interruptFlag.lingering) updateFlag();
      });
    },
  };
}
