import { presentRun, type Run } from "../output/run.js";
import { pause } from "../transport/pause.js";
import { Interrupted } from "./cell-error.js";
import { haltName, pauseName } from "./loop-checks.js";

/** Stops cells. The transport thread raises the flag; this obeys it, once. */
export interface Interrupts {
  /** Called before a cell runs; `stop` ends its waiting. */
  readonly begin: (run: Run, stop: () => void) => void;
  /** Called when the cell has been answered. */
  readonly end: () => void;
  /** Called with the number of an interrupt when the main thread hears of it. */
  readonly heard: (count: number) => void;
  /** Follows work that a cell is still waiting for, so that the flag is lowered once it has ended. */
  readonly follow: <T>(work: Promise<T>) => Promise<T>;
}

export const interruptQuestion: unique symbol = Symbol.for("periodwise.interrupt") as never;

export function interrupts(shared: Int32Array): Interrupts {
  let obeyed = 0;
  let running: { readonly run: Run; readonly stop: () => void } | undefined;
  const lingering = new Set<Run>();

  const settle = (): void => {
    obeyed = Atomics.load(shared, pause.countAt);
    Atomics.store(shared, pause.stateAt, lingering.size > 0 ? pause.lingering : pause.none);
  };
  const mustStop = (): boolean => {
    const state = shared[pause.stateAt];
    return state === pause.fresh || (state === pause.lingering && presentRun()?.stopped === true);
  };
  const halt = (): void => {
    if (mustStop()) throw new Interrupted();
  };
  const hidden = { enumerable: false, configurable: true, writable: false };
  Object.defineProperty(globalThis, pauseName, { ...hidden, value: shared });
  Object.defineProperty(globalThis, haltName, { ...hidden, value: halt });
  Object.defineProperty(globalThis, interruptQuestion, { ...hidden, value: mustStop });

  return {
    begin: (run, stop) => {
      running = { run, stop };
      settle();
    },
    end: () => {
      running = undefined;
      // An interrupt that came while the cell was ending must not reach the next one.
      settle();
    },
    heard: (count) => {
      if (count <= obeyed) return;
      if (running !== undefined) {
        running.run.stopped = true;
        running.stop();
      }
      settle();
    },
    follow: (work) => {
      const run = presentRun();
      if (run === undefined) return work;
      lingering.add(run);
      return work.finally(() => {
        lingering.delete(run);
        if (shared[pause.stateAt] === pause.lingering) settle();
      });
    },
  };
}
