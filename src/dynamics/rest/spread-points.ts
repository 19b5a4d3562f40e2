import type { Interval } from "../../rule/index.js";

/** Fractional parts of multiples of an irrational number spread evenly; one generator a dimension. */
function generators(size: number): readonly number[] {
  // The positive root of x^(size+1) = x + 1, by which the points stay apart in every number of dimensions.
  let root = 2;
  for (let i = 0; i < 60; i++) root = (1 + root) ** (1 / (size + 1));
  return Array.from({ length: size }, (_, i) => root ** -(i + 1));
}

/** Maps 0..1 onto a range: evenly where it is narrow, by powers of ten from near zero where it is wide. */
function placed(part: number, [low, high]: Interval): number {
  if (!(high - low > 1e3)) return low + part * (high - low);
  // A range of a million times a size reaches down to a thousandth of that size's reciprocal.
  const unit = 1e3 / Math.max(Math.abs(low), Math.abs(high));
  const up = Math.asinh(high / unit);
  const down = Math.asinh(low / unit);
  return unit * Math.sinh(down + part * (up - down));
}

/** Places spread over a box without a pattern that a rule could fall in with; always the same ones. */
export function spreadPoints(box: readonly Interval[], count: number): readonly Float64Array[] {
  const steps = generators(box.length);
  return Array.from({ length: count }, (_, k) =>
    Float64Array.from(box, (range, i) => placed((0.5 + (k + 1) * steps[i]!) % 1, range)),
  );
}
