import { type Estimate, type Fit, type GroupFit, type Held, problemOf } from "../../estimate/index.js";
import { studentQuantile } from "../../numeric/index.js";
import { drawnSpread, type ParametersDraw } from "./draw-parameters.js";

/** Fits with the loose unknown held, on each side of its estimate. */
const rungsASide = 24;

/** One value of the loose unknown, with what the others then are. */
interface Rung {
  /** Signed root of the profile's increase: a Student t value at the truth. */
  readonly root: number;
  /** [unknowns], the loose one in its place. */
  readonly centre: Float64Array;
  /** Cholesky factor of the others' covariance, [unknowns - 1, unknowns - 1]. */
  readonly factor: Float64Array;
}

/**
 * Draws where the record does not determine an unknown: its value along its profile, the others around their best for
 * that value.
 *
 * The signed root of the profile's increase is a t value with n - p degrees of freedom, so a drawn t value names a
 * place on the profile, and the draws have the profile interval as their own. Where the profile stays below a drawn
 * t value for ever, the draw takes the last value that was looked at: to the rule that is as good as without
 * limit, and the share of such draws is what the record leaves open.
 *
 * @see Bates and Watts (1988), Nonlinear Regression Analysis and Its Applications, section 6.1, for the profile t;
 *   Schweder and Hjort (2016), Confidence, Likelihood, Probability, chapter 3, for draws from it (from memory).
 * @returns undefined where the others cannot be separated either.
 */
export function drawAlongProfile(fit: Fit, group: GroupFit, loose: Estimate): ParametersDraw | undefined {
  const place = group.estimates.indexOf(loose);
  const rungs = rungsOf(fit, group, loose);
  if (rungs.length < 2) return undefined;
  const size = group.estimates.length;
  const normals = new Float64Array(size - 1);
  return (stream, out) => {
    const root = studentQuantile(stream.uniform(), group.degreesOfFreedom);
    const { low, high, share } = around(rungs, root);
    const { factor } = share < 0.5 ? low : high;
    // Of the place that is drawn, which beyond the last one looked at is nearer than the t value says.
    let distance = (low.root + share * (high.root - low.root)) ** 2;
    for (let i = 0; i < size - 1; i++) {
      normals[i] = stream.normal();
      distance += normals[i]! * normals[i]!;
    }
    let row = 0;
    for (let i = 0; i < size; i++) {
      out[i] = low.centre[i]! + share * (high.centre[i]! - low.centre[i]!);
      if (i === place) continue;
      for (let k = 0; k <= row; k++) out[i] = out[i]! + factor[row * (size - 1) + k]! * normals[k]!;
      row++;
    }
    return { sigma: drawnSpread(group.degreesOfFreedom, stream), distance };
  };
}

/**
 * The unknown that the record leaves most open: the one whose profile was followed and rises least on an open side.
 */
export function loosest(group: GroupFit): Estimate | undefined {
  const rise = ({ trace, profile }: Estimate): number =>
    Math.min(
      profile.lower === undefined ? (trace[0]?.increase ?? 0) : Number.POSITIVE_INFINITY,
      profile.upper === undefined ? (trace[trace.length - 1]?.increase ?? 0) : Number.POSITIVE_INFINITY,
    );
  const open = group.estimates.filter(
    (estimate) => estimate.role !== "scale" && estimate.trace.length > 1 && Number.isFinite(rise(estimate)),
  );
  return open.sort((a, b) => rise(a) - rise(b))[0];
}

/** A profile with one side of its interval longer than the other by less than this passes for a parabola. */
const asParabola = 1.25;

/**
 * The unknown whose profile is furthest from a parabola: around the estimates its draws, and those of what depends on
 * it, would stray from what the record allows.
 */
export function mostBent(group: GroupFit): Estimate | undefined {
  const bend = ({ value, profile: { lower, upper } }: Estimate): number => {
    if (lower === undefined || upper === undefined) return 1;
    const ratio = (upper - value) / (value - lower);
    return Math.max(ratio, 1 / ratio);
  };
  const known = group.estimates.filter(
    (estimate) => estimate.role !== "scale" && estimate.trace.length > 1 && bend(estimate) > asParabola,
  );
  const [first] = known.sort((a, b) => bend(b) - bend(a));
  return known.find(({ role }) => role === "parameter") ?? first;
}

/** Rungs by increasing root, kept where the root rises with the value; each begins where its neighbour ended. */
function rungsOf(fit: Fit, group: GroupFit, loose: Estimate): readonly Rung[] {
  const { hold } = problemOf(fit).group(group.group);
  const side = (values: readonly number[]): Rung[] => {
    let last: Held | undefined;
    return values.flatMap((value) => {
      const held = hold(loose.name, value, last);
      if (held?.factor === undefined || !Number.isFinite(held.increase)) return [];
      last = held;
      const root = Math.sign(value - loose.value) * Math.sqrt(held.increase);
      return [{ root, centre: held.estimates, factor: held.factor }];
    });
  };
  const rungs = [
    ...side(sideValues(loose, -1)).reverse(),
    ...side([loose.value]),
    ...side(sideValues(loose, 1)),
  ];
  const kept: Rung[] = [];
  for (const rung of rungs) if (kept.every((before) => before.root < rung.root)) kept.push(rung);
  return kept;
}

/** Evenly to twice the limit where there is one; by growing steps as far as the profile was followed where not. */
function sideValues(loose: Estimate, direction: 1 | -1): number[] {
  const { value, profile, trace } = loose;
  const limit = direction > 0 ? profile.upper : profile.lower;
  const end = direction > 0 ? trace[trace.length - 1]!.value : trace[0]!.value;
  if (limit !== undefined)
    return Array.from({ length: rungsASide }, (_, k) => value + ((k + 1) / rungsASide) * 2 * (limit - value));
  const beyond = trace
    .filter((at) => direction * (at.value - value) > 0)
    .map((at) => Math.abs(at.value - value));
  const first = Math.min(...beyond, Math.abs(end - value)) / 8;
  const growth = Math.max(1, Math.abs(end - value) / first) ** (1 / rungsASide);
  return Array.from({ length: rungsASide }, (_, k) => value + direction * first * growth ** (k + 1));
}

/** The rungs on both sides of a root, and how far it lies from the lower to the upper. */
function around(rungs: readonly Rung[], root: number): { low: Rung; high: Rung; share: number } {
  const above = rungs.findIndex((rung) => rung.root >= root);
  const last = rungs[rungs.length - 1]!;
  if (above < 0) return { low: last, high: last, share: 0 };
  if (above === 0) return { low: rungs[0]!, high: rungs[0]!, share: 0 };
  const low = rungs[above - 1]!;
  const high = rungs[above]!;
  return { low, high, share: (root - low.root) / (high.root - low.root) };
}
