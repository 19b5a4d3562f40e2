/**
 * What the two threads share about interrupts, in an Int32Array over shared memory.
 *
 * `state` is read in every loop of every cell, so it is one number: none; fresh (whatever runs must stop);
 * or lingering (a stopped cell still has work in flight, which stops when it next looks).
 * `count` numbers the interrupts, so that one that already took effect is not obeyed a second time.
 */
export const pause = {
  none: 0,
  fresh: 1,
  lingering: 2,
  stateAt: 0,
  countAt: 1,
} as const;

export function newPause(): Int32Array {
  return new Int32Array(new SharedArrayBuffer(2 * Int32Array.BYTES_PER_ELEMENT));
}
