import { Script } from "node:vm";

const segmentName = "__periodwiseSegment";
const script = new Script(`globalThis.${segmentName}()`, { filename: "segment.js" });

/**
 * Runs a cell that yields what it awaits. Each segment between two awaits can be stopped anywhere by the signal that an
 * interrupt sends; code after a native `await` could not be.
 *
 * @returns when the cell has ended; rejects with what it threw, or with Node's error for an interrupted script.
 */
export async function runBetweenAwaits(cell: () => Generator<unknown, void, unknown>): Promise<void> {
  const running = cell();
  let step = interruptible(() => running.next());
  while (!step.done) {
    const awaited = await settled(step.value);
    step = interruptible(() =>
      awaited.isFulfilled ? running.next(awaited.value) : running.throw(awaited.value),
    );
  }
}

type Settled = { readonly isFulfilled: boolean; readonly value: unknown };

async function settled(promise: unknown): Promise<Settled> {
  try {
    return { isFulfilled: true, value: await promise };
  } catch (value) {
    return { isFulfilled: false, value };
  }
}

function interruptible<T>(segment: () => T): T {
  Object.defineProperty(globalThis, segmentName, { value: segment, configurable: true, enumerable: false });
  return script.runInThisContext({ breakOnSigint: true }) as T;
}
