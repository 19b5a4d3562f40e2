/**
 * The interrupt flag that two threads share, in an Int32Array over shared memory.
 *
 * `state` is read in every loop of every cell, so it is one number: none; fresh (whatever runs must stop); or
 * lingering (a stopped cell still has pending work, which stops at its next check).
 * `count` numbers the interrupts, so that none takes effect twice.
 */
export const interruptFlag = {
  none: 0,
  fresh: 1,
  lingering: 2,
  stateAt: 0,
  countAt: 1,
} as const;

export function newInterruptFlag(): Int32Array {
  return new Int32Array(new SharedArrayBuffer(2 * Int32Array.BYTES_PER_ELEMENT));
}
