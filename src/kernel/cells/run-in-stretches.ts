import { Script } from "node:vm";

const stretchName = "__periodwiseStretch";
const script = new Script(`globalThis.${stretchName}()`, { filename: "stretch.js" });

/**
 * Runs a cell that yields what it waits for. Each stretch between two waits can be broken off by the signal that
 * an interrupt sends, wherever in it the work is; code after an `await` of Node's own could not be.
 *
 * @returns when the cell has ended; rejects with what it threw, or with Node's error for a broken run.
 */
export async function runInStretches(cell: () => Generator<unknown, void, unknown>): Promise<void> {
  const running = cell();
  let step = breakable(() => running.next());
  while (!step.done) {
    const came = await settled(step.value);
    step = breakable(() => (came.kept ? running.next(came.value) : running.throw(came.value)));
  }
}

type Settled = { readonly kept: boolean; readonly value: unknown };

async function settled(waitedFor: unknown): Promise<Settled> {
  try {
    return { kept: true, value: await waitedFor };
  } catch (value) {
    return { kept: false, value };
  }
}

function breakable<T>(stretch: () => T): T {
  Object.defineProperty(globalThis, stretchName, { value: stretch, configurable: true, enumerable: false });
  return script.runInThisContext({ breakOnSigint: true }) as T;
}
