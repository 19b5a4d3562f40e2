import { spread } from "./solve-within.js";

/** The highest place of a function within a range. */
export interface Peak {
  readonly at: number;
  readonly height: number;
  readonly atEnd: boolean;
  /** Places that were looked at first, by increasing setting. */
  readonly looked: readonly { readonly at: number; readonly height: number }[];
}

const looks = 64;
const golden = (3 - Math.sqrt(5)) / 2;

/**
 * The highest of 64 places, refined between its neighbours by golden section.
 *
 * @param tolerance - relative width at which the search ends; below 1e-8 the height no longer tells places apart.
 * @see Kiefer (1953), Sequential minimax search for a maximum, Proceedings of the AMS 4:502.
 */
export function findPeak(
  height: (at: number) => number,
  from: number,
  to: number,
  tolerance: number = 1e-9,
): Peak {
  const looked = spread(from, to, looks).map((at) => ({ at, height: height(at) }));
  const top = looked.reduce((best, next, i) => (next.height > looked[best]!.height ? i : best), 0);
  let low = looked[Math.max(0, top - 1)]!.at;
  let high = looked[Math.min(looks - 1, top + 1)]!.at;
  let best = looked[top]!;
  let left = probe(height, low + golden * (high - low));
  let right = probe(height, high - golden * (high - low));
  while (high - low > tolerance * Math.max(Math.abs(low), Math.abs(high))) {
    for (const each of [left, right]) if (each.height > best.height) best = each;
    if (left.height >= right.height) {
      high = right.at;
      right = left;
      left = probe(height, low + golden * (high - low));
    } else {
      low = left.at;
      left = right;
      right = probe(height, high - golden * (high - low));
    }
  }
  return { ...best, atEnd: best.at === from || best.at === to, looked };
}

function probe(height: (at: number) => number, at: number): { at: number; height: number } {
  return { at, height: height(at) };
}
