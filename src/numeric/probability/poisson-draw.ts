import { logGamma } from "./log-gamma.js";
import type { RandomStream } from "./random-stream.js";

/** Above this mean the counting of single events gives way to transformed rejection. */
const few = 30;

/**
 * A Poisson count of the given mean; NaN where the mean is negative or not finite.
 *
 * @see Hörmann (1993), The transformed rejection method for generating Poisson random variables, Insurance:
 *   Mathematics and Economics 12:39, algorithm PTRS, for means above 30.
 */
export function poissonDraw(mean: number, stream: RandomStream): number {
  if (!(mean >= 0 && Number.isFinite(mean))) return Number.NaN;
  return mean < few ? countedEvents(mean, stream) : transformedRejection(mean, stream);
}

function countedEvents(mean: number, stream: RandomStream): number {
  const floor = Math.exp(-mean);
  let count = 0;
  for (let product = stream.uniform(); product > floor; product *= stream.uniform()) count++;
  return count;
}

function transformedRejection(mean: number, stream: RandomStream): number {
  const b = 0.931 + 2.53 * Math.sqrt(mean);
  const a = -0.059 + 0.02483 * b;
  const inverseAlpha = 1.1239 + 1.1328 / (b - 3.4);
  const edge = 0.9277 - 3.6224 / (b - 2);
  const logMean = Math.log(mean);
  for (;;) {
    const u = stream.uniform() - 0.5;
    const v = stream.uniform();
    const distance = 0.5 - Math.abs(u);
    const count = Math.floor(((2 * a) / distance + b) * u + mean + 0.43);
    if (distance >= 0.07 && v <= edge) return count;
    if (count < 0 || (distance < 0.013 && v > distance)) continue;
    const hat = Math.log((v * inverseAlpha) / (a / (distance * distance) + b));
    if (hat <= count * logMean - mean - logGamma(count + 1)) return count;
  }
}
