import { findRoot } from "../../numeric/index.js";

/** A place at which a function crosses zero, between the two nearest places on either side that were tried. */
export interface Crossing {
  /** The place that is not above zero, or the root where the function has one. */
  readonly at: number;
  readonly below: number;
  readonly above: number;
  /** Whether the function jumps over zero there. */
  readonly jumps: boolean;
}

/** Where a function of a setting crosses zero, and how near it comes where it does not. */
export interface Roots {
  readonly roots: readonly Crossing[];
  /** The place looked at with the smallest value, in size. */
  readonly nearest: number;
  /** Smallest and largest value found; NaN where some place has none. */
  readonly least: number;
  readonly greatest: number;
  /** Whether the function was the same everywhere. */
  readonly flat: boolean;
}

/** How a range is searched. */
export interface SearchOptions {
  /** Places at which the function is looked at before its crossings are refined; default 64. */
  readonly looks?: number;
  /** Look for the edge of the part that is not above zero, for a function that is zero over a stretch. */
  readonly edge?: boolean;
  /** Relative width at which the search ends; default 0, the last digit. */
  readonly tolerance?: number;
  /** Only multiples of this are tried. */
  readonly multiple?: number | undefined;
  /** What counts as zero: a Monte-Carlo error. Default 0. */
  readonly slack?: (at: number) => number;
}

/**
 * Every crossing of zero between two ends that shows on some places (by equal ratios where the ends are far apart and
 * of one sign), refined by Brent's method; by halving where one side is infinite or zero, an edge is sought, or only
 * multiples count.
 */
export function solveWithin(
  excess: (value: number) => number,
  from: number,
  to: number,
  options: SearchOptions = {},
): Roots {
  const { looks = 64, multiple } = options;
  const places = spread(from, to, looks, multiple);
  const values = places.map(excess);
  const roots: Crossing[] = [];
  for (let i = 1; i < places.length; i++) {
    const [a, b] = [values[i - 1]!, values[i]!];
    if (Number.isNaN(a) || Number.isNaN(b) || a > 0 === b > 0) continue;
    roots.push(refined(excess, [places[i - 1]!, places[i]!], [a, b], options));
  }
  const numbers = values.filter((value) => !Number.isNaN(value));
  const best = values.reduce(
    (least, value, i) =>
      Math.abs(value) < Math.abs(values[least]!) || Number.isNaN(values[least]!) ? i : least,
    0,
  );
  return {
    roots,
    nearest: places[best]!,
    least: Math.min(...values),
    greatest: Math.max(...values),
    flat: numbers.length > 1 && numbers.every((value) => value === numbers[0]),
  };
}

/** A continuous function is this much smaller at its root than at the places around it. */
const vanishing = 1e-3;

function refined(
  excess: (value: number) => number,
  [low, high]: readonly [number, number],
  [a, b]: readonly [number, number],
  { edge = false, tolerance = 0, multiple, slack = () => 0 }: SearchOptions,
): Crossing {
  const smooth = !edge && Number.isFinite(a) && Number.isFinite(b) && a !== 0 && b !== 0;
  if (smooth) {
    const at = findRoot(excess, low, high, {
      tolerance: tolerance * Math.max(Math.abs(low), Math.abs(high)),
    });
    const small = Math.max(vanishing * Math.min(Math.abs(a), Math.abs(b)), slack(at));
    if (Math.abs(excess(at)) <= small) return { at, below: at, above: at, jumps: false };
  }
  const [below, above] = halved(excess, low, high, tolerance, multiple);
  const met = excess(below) > 0 ? above : below;
  const zero = (place: number): boolean => Math.abs(excess(place)) <= slack(place);
  return { at: met, below, above, jumps: !edge && !zero(below) && !zero(above) };
}

/** Two neighbouring places between which a function changes between being above zero and not. */
function halved(
  excess: (value: number) => number,
  from: number,
  to: number,
  tolerance: number,
  multiple: number | undefined,
): readonly [number, number] {
  const above = excess(from) > 0;
  let near = from;
  let far = to;
  for (let k = 0; k < 80; k++) {
    const middle = onMultiple(0.5 * (near + far), multiple);
    const close = Math.abs(far - near) <= tolerance * Math.max(Math.abs(near), Math.abs(far));
    if (close || middle === near || middle === far) break;
    if (excess(middle) > 0 === above) near = middle;
    else far = middle;
  }
  return [near, far];
}

/** Places from one end to the other, ends included; multiples where only those count. */
export function spread(from: number, to: number, count: number, multiple?: number): number[] {
  const ratio = to / from;
  const far = ratio > 20 && Number.isFinite(ratio);
  const places = Array.from({ length: count }, (_, i) => {
    const share = i / (count - 1);
    if (i === count - 1) return to;
    return far ? from * ratio ** share : from + share * (to - from);
  });
  if (multiple === undefined) return places;
  const whole = places.map((place) => onMultiple(place, multiple));
  return [...new Set(whole)].filter((place) => place >= from && place <= to);
}

/** The nearest multiple, in the digits that a person would write. */
export function onMultiple(value: number, multiple: number | undefined): number {
  return multiple === undefined ? value : Number((Math.round(value / multiple) * multiple).toPrecision(15));
}
