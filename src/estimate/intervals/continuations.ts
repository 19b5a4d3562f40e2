import type { ProfilePoint, ProfileProblem } from "./profile-walk.js";

/**
 * Where a search with unknown i held at a value may begin, lowest first: the nearest points of the profile on either
 * side, with the other unknowns as they are there, moved as the covariance says, and carried on along the line and
 * along the power law through the two nearest points. A ridge a * b = c is straight on the last of these only.
 *
 * @param points - by increasing value.
 */
export function continuations(
  problem: ProfileProblem,
  points: readonly ProfilePoint[],
  i: number,
  value: number,
): readonly Float64Array[] {
  const next = points.findIndex((point) => point.value >= value);
  const above = next < 0 ? points.length : next;
  const sides = [
    [points[above - 1], points[above - 2]],
    [points[above], points[above + 1]],
  ];
  return sides
    .flatMap(([near, far]) => (near === undefined ? [] : carried(problem, near, far, i, value)))
    .map((start) => withinBounds(start, problem, i))
    .map((start) => ({ start, height: problem.objective.value(start) }))
    .filter(({ height }) => Number.isFinite(height))
    .sort((a, b) => a.height - b.height)
    .map(({ start }) => start);
}

function carried(
  { covariance }: ProfileProblem,
  near: ProfilePoint,
  far: ProfilePoint | undefined,
  i: number,
  value: number,
): readonly Float64Array[] {
  const from = near.estimates;
  const size = from.length;
  const move = value - near.value;
  const to = (other: (k: number) => number): Float64Array => from.map((_, k) => (k === i ? value : other(k)));
  const ways = [to((k) => from[k]!)];
  const spread = covariance[i * size + i]!;
  if (spread > 0) ways.push(to((k) => from[k]! + (covariance[k * size + i]! / spread) * move));
  if (far === undefined) return ways;
  const before = far.estimates;
  const share = move / (near.value - far.value);
  ways.push(to((k) => from[k]! + share * (from[k]! - before[k]!)));
  const power = Math.log(value / near.value) / Math.log(near.value / far.value);
  if (Number.isFinite(power))
    ways.push(
      to((k) => (from[k]! * before[k]! > 0 ? from[k]! * (from[k]! / before[k]!) ** power : from[k]!)),
    );
  return ways;
}

function withinBounds(start: Float64Array, { lower, upper }: ProfileProblem, i: number): Float64Array {
  return start.map((value, k) => (k === i ? value : Math.min(Math.max(value, lower[k]!), upper[k]!)));
}
