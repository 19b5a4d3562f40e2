import { type Estimate, type Fit, fit as fitRule, type GroupFit } from "../../estimate/index.js";
import { choleskyFactor, studentQuantile } from "../../numeric/index.js";
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
  const rungs = ladder(fit, group, loose, place);
  if (rungs.length < 2) return undefined;
  const size = group.estimates.length;
  const normals = new Float64Array(size - 1);
  return (stream, out) => {
    const root = studentQuantile(stream.uniform(), group.degreesOfFreedom);
    const { low, high, share } = around(rungs, root);
    const { factor } = share < 0.5 ? low : high;
    for (let i = 0; i < size - 1; i++) normals[i] = stream.normal();
    let row = 0;
    for (let i = 0; i < size; i++) {
      out[i] = low.centre[i]! + share * (high.centre[i]! - low.centre[i]!);
      if (i === place) continue;
      for (let k = 0; k <= row; k++) out[i] = out[i]! + factor[row * (size - 1) + k]! * normals[k]!;
      row++;
    }
    return drawnSpread(group.degreesOfFreedom, stream);
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
    (estimate) => estimate.trace.length > 1 && Number.isFinite(rise(estimate)),
  );
  return open.sort((a, b) => rise(a) - rise(b))[0];
}

/** Rungs by increasing root, kept where the root rises with the value. */
function ladder(fit: Fit, group: GroupFit, loose: Estimate, place: number): readonly Rung[] {
  const down = sideValues(loose, -1).reverse();
  const rungs = [...down, loose.value, ...sideValues(loose, 1)].flatMap((value) => {
    const rung = rungAt(fit, group, loose, place, value);
    return rung === undefined ? [] : [rung];
  });
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

function rungAt(fit: Fit, group: GroupFit, loose: Estimate, place: number, value: number): Rung | undefined {
  const held = heldFit(fit, group, loose, value);
  if (held === undefined) return undefined;
  const factor = choleskyFactor(Float64Array.from(held.covariance), held.estimates.length);
  const rise = riseOf(fit, group, held);
  const centre = held.estimates.map((estimate) => estimate.value);
  centre.splice(place, 0, value);
  if (factor === undefined || !Number.isFinite(rise)) return undefined;
  return {
    root: Math.sign(value - loose.value) * Math.sqrt(rise),
    centre: Float64Array.from(centre),
    factor,
  };
}

/** The profile's increase, in units of sigma^2 for least squares and of twice the log likelihood otherwise. */
function riseOf({ options }: Fit, group: GroupFit, held: GroupFit): number {
  const squares =
    options.errors !== "both" && ["normal", "lognormal"].includes(`${options.distribution ?? "normal"}`);
  return squares
    ? Math.max(0, held.sumOfSquares - group.sumOfSquares) / group.sigma ** 2
    : Math.max(0, 2 * (group.criteria.logLikelihood - held.criteria.logLikelihood));
}

function heldFit(fit: Fit, group: GroupFit, loose: Estimate, value: number): GroupFit | undefined {
  const { rule, observations, options } = fit;
  const limits = options.bounds?.[loose.name] ?? rule.bounds[loose.name];
  if (limits !== undefined && (value < limits[0] || value > limits[1])) return undefined;
  const own = { ...observations, groups: observations.groups.filter((each) => each.name === group.group) };
  const state = loose.name.replace("[0]", "");
  const given = { ...rule.fixed, ...options.fixed };
  const start = Object.entries(group.parameters).filter(
    ([name]) => name !== loose.name && given[name] === undefined,
  );
  const asked =
    loose.role === "parameter"
      ? { fixed: { ...options.fixed, [loose.name]: value } }
      : { initial: { ...options.initial, [state]: value } };
  try {
    return fitRule(rule, own, {
      ...options,
      ...asked,
      start: Object.fromEntries(start),
      intervals: "none",
    }).groups[0];
  } catch (error) {
    // A value at which the rule cannot be run is simply no rung; anything else is a fault and goes on.
    if ((error as Error).name === "ModelError") return undefined;
    throw error;
  }
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
