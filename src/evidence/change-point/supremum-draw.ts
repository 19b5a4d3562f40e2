import type { RecordDraw, Refitter } from "../../estimate/index.js";
import { choleskyFactor, choleskySolve, type RandomStream } from "../../numeric/index.js";

/** Draws the largest F over all dates in a record without a break; undefined where the draw came to nothing. */
export type SupremumDraw = (stream: RandomStream) => number | undefined;

/**
 * Makes draws of the largest F over the dates under "no break": a record is drawn from the fit without one, fitted, and
 * at each date both parts take one Gauss-Newton step from that fit, which in a rule linear in its parameters is the whole
 * way.
 */
export function supremumDraw(again: Refitter, draw: RecordDraw, dates: readonly number[]): SupremumDraw {
  const { count, size } = again.rows;
  const sums = prefixSums(count, size);
  return (stream) => {
    if (draw(stream) === undefined) return undefined;
    const whole = again.minimise(again.at);
    if (whole.stop.kind === "failed") return undefined;
    sums.gather(again, whole.estimates);
    let gain = 0;
    for (const first of dates) gain = Math.max(gain, sums.gain(0, first) + sums.gain(first, count));
    return fRatio(whole.value, whole.value - gain, count, size);
  };
}

/** F of two parts against one: (S0 - S1)/p over S1/(n - 2p). */
export function fRatio(one: number, two: number, count: number, size: number): number {
  return ((one - two) / size / two) * (count - 2 * size);
}

interface PrefixSums {
  gather(again: Refitter, at: Float64Array): void;
  /** By how much one Gauss-Newton step lowers the sum of squares of compared values `from` to `to` - 1. */
  gain(from: number, to: number): number;
}

/** Sums of products of the slopes with each other and with the residuals, up to every compared value. */
function prefixSums(count: number, size: number): PrefixSums {
  const products = new Float64Array((count + 1) * size * size);
  const gradients = new Float64Array((count + 1) * size);
  const gram = new Float64Array(size * size);
  const gradient = new Float64Array(size);
  return {
    gather({ rows }, at) {
      rows.prepare(at, true);
      for (let i = 0; i < count; i++) {
        const residual = rows.residualAt(i);
        for (let a = 0; a < size; a++) {
          const slope = rows.row[a]!;
          gradients[(i + 1) * size + a] = gradients[i * size + a]! + slope * residual;
          for (let b = 0; b < size; b++) {
            const cell = a * size + b;
            products[(i + 1) * size * size + cell] = products[i * size * size + cell]! + slope * rows.row[b]!;
          }
        }
      }
    },
    gain(from, to) {
      for (let cell = 0; cell < size * size; cell++)
        gram[cell] = products[to * size * size + cell]! - products[from * size * size + cell]!;
      for (let a = 0; a < size; a++) gradient[a] = gradients[to * size + a]! - gradients[from * size + a]!;
      const factor = choleskyFactor(gram, size);
      if (factor === undefined) return 0;
      const step = choleskySolve(factor, gradient, size);
      let sum = 0;
      for (let a = 0; a < size; a++) sum += step[a]! * gradient[a]!;
      return sum;
    },
  };
}
