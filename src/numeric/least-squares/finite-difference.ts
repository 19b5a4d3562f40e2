/** Writes a function's values at the parameters to `into` [rows]; false where one is not finite. */
export type Sample = (parameters: Float64Array, into: Float64Array) => boolean;

/** What differences are taken of, and where the parameters must stay. */
export interface DifferenceProblem {
  readonly sample: Sample;
  readonly rows: number;
  readonly lower: Float64Array;
  readonly upper: Float64Array;
}

/** Writes (f(c + h) - f(c - h)) / 2h for parameter j to `column` [rows]; false where that cannot be had. */
export function centralSlope(
  problem: DifferenceProblem,
  parameters: Float64Array,
  j: number,
  step: number,
  column: Float64Array,
): boolean {
  const value = parameters[j]!;
  const high = value + step;
  const low = value - step;
  if (high > problem.upper[j]! || low < problem.lower[j]! || !(high > low)) return false;
  const above = new Float64Array(problem.rows);
  parameters[j] = high;
  const known = problem.sample(parameters, above);
  parameters[j] = low;
  const usable = known && problem.sample(parameters, column);
  parameters[j] = value;
  if (!usable) return false;
  for (let i = 0; i < above.length; i++) column[i] = (above[i]! - column[i]!) / (high - low);
  return true;
}

/**
 * The slope of second order from one side, (-3 f(c) + 4 f(c + h) - f(c + 2h)) / 2h, for parameters at a bound or
 * at the edge of where the function is defined. Tries the side above first, then the one below.
 */
export function oneSidedSlope(
  problem: DifferenceProblem,
  parameters: Float64Array,
  j: number,
  step: number,
  column: Float64Array,
): boolean {
  return sideSlope(problem, parameters, j, step, column) || sideSlope(problem, parameters, j, -step, column);
}

function sideSlope(
  problem: DifferenceProblem,
  parameters: Float64Array,
  j: number,
  step: number,
  column: Float64Array,
): boolean {
  const value = parameters[j]!;
  const far = value + 2 * step;
  if (far > problem.upper[j]! || far < problem.lower[j]! || far === value) return false;
  const near = new Float64Array(problem.rows);
  const here = new Float64Array(problem.rows);
  parameters[j] = far;
  let usable = problem.sample(parameters, column);
  parameters[j] = value + step;
  usable &&= problem.sample(parameters, near);
  parameters[j] = value;
  usable &&= problem.sample(parameters, here);
  if (!usable) return false;
  for (let i = 0; i < here.length; i++) {
    column[i] = (4 * near[i]! - 3 * here[i]! - column[i]!) / (far - value);
  }
  return true;
}

/** Relative distance of two columns, 0 where both vanish. */
export function disagreement(a: Float64Array, b: Float64Array): number {
  let apart = 0;
  let size = 0;
  for (let i = 0; i < a.length; i++) {
    apart += (a[i]! - b[i]!) ** 2;
    size += a[i]! ** 2 + b[i]! ** 2;
  }
  return size === 0 ? 0 : Math.sqrt((2 * apart) / size);
}
