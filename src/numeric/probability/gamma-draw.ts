import type { RandomStream } from "./random-stream.js";

/**
 * A gamma value of mean `shape` and scale 1.
 *
 * @param shape - positive.
 * @see Marsaglia and Tsang (2000), A simple method for generating gamma variables, ACM TOMS 26:363.
 */
export function gammaDraw(shape: number, stream: RandomStream): number {
  if (shape < 1) return gammaDraw(shape + 1, stream) * stream.uniform() ** (1 / shape);
  const d = shape - 1 / 3;
  const c = 1 / Math.sqrt(9 * d);
  for (;;) {
    const z = stream.normal();
    const v = (1 + c * z) ** 3;
    if (v > 0 && Math.log(stream.uniform()) < 0.5 * z * z + d * (1 - v + Math.log(v))) return d * v;
  }
}
