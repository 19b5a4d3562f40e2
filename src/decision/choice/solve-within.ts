import { findRoot } from "../../numeric/index.js";

/** Where a function of a setting crosses zero, and how near it comes where it does not. */
export interface Roots {
  readonly roots: readonly number[];
  /** The place looked at with the smallest value, in size. */
  readonly nearest: { readonly at: number; readonly excess: number };
  /** Smallest and largest value found; NaN where some place has none. */
  readonly least: number;
  readonly greatest: number;
  /** Whether the function was the same everywhere. */
  readonly flat: boolean;
}

/** Places at which a function is looked at before its crossings are refined. */
const manyLooks = 64;

/**
 * Every crossing of zero between two ends that shows on 64 places, or as many as are asked for (by equal ratios where the ends are far apart and of one
 * sign), refined by Brent's method; by halving where one side is infinite or zero.
 *
 * @param options.edge - look for the edge of the part that is not above zero, for a function that is zero over a stretch.
 */
export function solveWithin(
  excess: (value: number) => number,
  from: number,
  to: number,
  options: { readonly tolerance?: number; readonly edge?: boolean; readonly looks?: number } = {},
): Roots {
  const places = spread(from, to, options.looks ?? manyLooks);
  const values = places.map(excess);
  const roots: number[] = [];
  for (let i = 1; i < places.length; i++) {
    const [a, b] = [values[i - 1]!, values[i]!];
    if (Number.isNaN(a) || Number.isNaN(b) || a > 0 === b > 0) continue;
    const { tolerance = 0, edge = false } = options;
    const smooth = !edge && Number.isFinite(a) && Number.isFinite(b) && a !== 0 && b !== 0;
    const [low, high] = [places[i - 1]!, places[i]!];
    roots.push(
      smooth ? findRoot(excess, low, high, { tolerance }) : boundary(excess, low, high, a > 0, tolerance),
    );
  }
  const numbers = values.filter((value) => !Number.isNaN(value));
  const best = values.reduce(
    (least, value, i) =>
      Math.abs(value) < Math.abs(values[least]!) || Number.isNaN(values[least]!) ? i : least,
    0,
  );
  return {
    roots,
    nearest: { at: places[best]!, excess: values[best]! },
    least: Math.min(...values),
    greatest: Math.max(...values),
    flat: numbers.length > 1 && numbers.every((value) => value === numbers[0]),
  };
}

/** Places from one end to the other, ends included. */
export function spread(from: number, to: number, count: number): number[] {
  const ratio = to / from;
  const far = ratio > 20 && Number.isFinite(ratio);
  return Array.from({ length: count }, (_, i) => {
    const share = i / (count - 1);
    if (i === count - 1) return to;
    return far ? from * ratio ** share : from + share * (to - from);
  });
}

/** The edge between where a function is above zero and where it is not, by halving. */
function boundary(
  excess: (value: number) => number,
  from: number,
  to: number,
  above: boolean,
  tolerance: number,
): number {
  let near = from;
  let far = to;
  for (let k = 0; k < 60 && Math.abs(far - near) > tolerance; k++) {
    const middle = 0.5 * (near + far);
    if (middle === near || middle === far) break;
    if (excess(middle) > 0 === above) near = middle;
    else far = middle;
  }
  return above ? far : near;
}
