import { noSignChange } from "../refusals.js";

/** How closely a root is found. */
export interface RootOptions {
  /** Absolute, in the unit of the argument; the rounding of the argument is always added. Default 0. */
  readonly tolerance?: number;
  /** Default 200. */
  readonly iterationLimit?: number;
}

/**
 * Finds where a continuous function is zero between two places at which its signs differ, by Brent's method
 * (inverse quadratic interpolation, secant and bisection).
 *
 * @param from - one end of the range, in the unit of the argument; `to` may lie on either side of it.
 * @returns the end of the last bracket with the smaller function value.
 * @throws {ModelError} `no-sign-change` when the function has the same sign at both ends, or is not a number.
 * @see Brent (1973), Algorithms for Minimization without Derivatives, chapter 4.
 * @example findRoot((x) => x * x - 2, 0, 2); // 1.414213562373095
 */
export function findRoot(
  of: (value: number) => number,
  from: number,
  to: number,
  options: RootOptions = {},
): number {
  const { tolerance = 0, iterationLimit = 200 } = options;
  const bracket: Bracket = {
    a: from,
    b: to,
    c: from,
    fa: of(from),
    fb: of(to),
    fc: 0,
    last: to - from,
    before: to - from,
  };
  if (!(Math.sign(bracket.fa) * Math.sign(bracket.fb) <= 0)) {
    throw noSignChange(from, to, bracket.fa, bracket.fb);
  }
  bracket.fc = bracket.fa;
  for (let k = 0; k < iterationLimit; k++) {
    arrange(bracket);
    const least = 2 * Number.EPSILON * Math.abs(bracket.b) + 0.5 * tolerance;
    const middle = 0.5 * (bracket.c - bracket.b);
    if (Math.abs(middle) <= least || bracket.fb === 0) return bracket.b;
    advance(bracket, middle, least);
    bracket.fb = of(bracket.b);
  }
  return bracket.b;
}

/** b is the best place, a the one before it, c the other side of the root; last and before are step lengths. */
interface Bracket {
  a: number;
  b: number;
  c: number;
  fa: number;
  fb: number;
  fc: number;
  last: number;
  before: number;
}

function arrange(at: Bracket): void {
  if (at.fb > 0 === at.fc > 0) {
    at.c = at.a;
    at.fc = at.fa;
    at.last = at.b - at.a;
    at.before = at.last;
  }
  if (Math.abs(at.fc) < Math.abs(at.fb)) {
    at.a = at.b;
    at.b = at.c;
    at.c = at.a;
    at.fa = at.fb;
    at.fb = at.fc;
    at.fc = at.fa;
  }
}

function advance(at: Bracket, middle: number, least: number): void {
  const step = interpolated(at, middle, least);
  at.before = step === undefined ? middle : at.last;
  at.last = step ?? middle;
  at.a = at.b;
  at.fa = at.fb;
  at.b += Math.abs(at.last) > least ? at.last : Math.sign(middle) * least;
}

/** The interpolated step, or undefined where bisection is the safer one. */
function interpolated(at: Bracket, middle: number, least: number): number | undefined {
  if (Math.abs(at.before) < least || Math.abs(at.fa) <= Math.abs(at.fb)) return undefined;
  const s = at.fb / at.fa;
  let p = 2 * middle * s;
  let q = 1 - s;
  if (at.a !== at.c) {
    const t = at.fa / at.fc;
    const r = at.fb / at.fc;
    p = s * (2 * middle * t * (t - r) - (at.b - at.a) * (r - 1));
    q = (t - 1) * (r - 1) * (s - 1);
  }
  if (p > 0) q = -q;
  p = Math.abs(p);
  const fits = 2 * p < Math.min(3 * middle * q - Math.abs(least * q), Math.abs(at.before * q));
  return fits ? p / q : undefined;
}
