import { onMultiple, spread } from "./solve-within.js";

/** A place with the height there. */
export interface Place {
  readonly at: number;
  readonly height: number;
}

/** The highest place of a function within a range. */
export interface Peak extends Place {
  readonly atEnd: boolean;
  /** Places that were looked at first, by increasing setting. */
  readonly looked: readonly Place[];
}

/** How a range is searched. */
export interface PeakSearch {
  readonly looks: number;
  /** Relative width at which the search ends; below 1e-8 the height no longer tells places apart. */
  readonly tolerance: number;
  /** Only multiples of this are tried. */
  readonly multiple?: number | undefined;
}

const golden = (3 - Math.sqrt(5)) / 2;

/**
 * The highest of some places, refined between its neighbours by golden section, or over the multiples there.
 *
 * @see Kiefer (1953), Sequential minimax search for a maximum, Proceedings of the AMS 4:502.
 */
export function findPeak(
  height: (at: number) => number,
  from: number,
  to: number,
  { looks, tolerance, multiple }: PeakSearch,
): Peak {
  const probe = (at: number): Place => ({ at, height: height(at) });
  const looked = spread(from, to, looks, multiple).map(probe);
  const top = highest(looked);
  const low = looked[Math.max(0, top - 1)]!.at;
  const high = looked[Math.min(looked.length - 1, top + 1)]!.at;
  const best =
    multiple === undefined
      ? bySection(probe, looked[top]!, low, high, tolerance)
      : byMultiples(probe, low, high, looks, multiple);
  const ends = [looked[0]!.at, looked[looked.length - 1]!.at];
  return { ...best, atEnd: ends.includes(best.at), looked };
}

function highest(places: readonly Place[]): number {
  return places.reduce((best, next, i) => (next.height > places[best]!.height ? i : best), 0);
}

function bySection(
  probe: (at: number) => Place,
  top: Place,
  from: number,
  to: number,
  tolerance: number,
): Place {
  let [best, low, high] = [top, from, to];
  let left = probe(low + golden * (high - low));
  let right = probe(high - golden * (high - low));
  while (high - low > tolerance * Math.max(Math.abs(low), Math.abs(high))) {
    for (const each of [left, right]) if (each.height > best.height) best = each;
    if (left.height >= right.height) {
      high = right.at;
      right = left;
      left = probe(low + golden * (high - low));
    } else {
      low = left.at;
      left = right;
      right = probe(high - golden * (high - low));
    }
  }
  return best;
}

/** The highest multiple between two, by looking closer around the highest until every one there was tried. */
function byMultiples(
  probe: (at: number) => Place,
  from: number,
  to: number,
  looks: number,
  multiple: number,
): Place {
  let [low, high] = [from, to];
  for (;;) {
    const places = spread(low, high, looks, multiple).map(probe);
    const top = highest(places);
    if (onMultiple((high - low) / multiple, 1) < looks) return places[top]!;
    low = places[Math.max(0, top - 1)]!.at;
    high = places[Math.min(places.length - 1, top + 1)]!.at;
  }
}
