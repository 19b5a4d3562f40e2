import type { Warning } from "../../numeric/index.js";
import { compileRule } from "../../rule/index.js";
import { onLogScale } from "../options/fit-options.js";
import { place } from "../unknowns/unknowns.js";
import type { FitContext } from "./fit-warnings.js";
import type { GroupFit } from "./group-fit.js";

/** A bias of the slope below this part of its standard error costs an interval hardly any coverage: from simulation. */
const telling = 0.75;
/** How closely slopes at the ends of a record must agree, and directions of derivatives, relative. */
const alike = 1e-7;

/**
 * What small samples do to a slope that is estimated beside an intercept: it comes out too low, and where 1 is not excluded,
 * profile and Wald intervals lose coverage. Neither holds where the rule gives the slope, as geometric and constant change
 * do, or has no intercept.
 */
export function slopeWarnings(fit: Omit<GroupFit, "warnings">, context: FitContext): Warning[] {
  const found = context.options.errors === "process" ? slopeBesideIntercept(fit, context) : undefined;
  if (found === undefined) return [];
  const { slope, error, name } = found;
  const bias = biasOf(found, fit.count);
  const shown = `Slope of the next value on the present one ${slope.toFixed(3)}`;
  const remedy = `Use gridInterval(fit, "${name}"), which simulates at every value.`;
  const warnings: Warning[] = [];
  if (bias > telling * error)
    warnings.push({
      code: "slope-bias",
      message: `${shown}: estimates from ${fit.count} pairs are too low by about ${bias.toFixed(3)} on average. ${remedy}`,
    });
  if (slope + Math.sqrt(fit.cut) * error >= 1)
    warnings.push({
      code: "near-unit-root",
      message: `${shown}; its interval reaches 1, where profile and Wald intervals cover less than stated. ${remedy}`,
    });
  return warnings;
}

/**
 * By how much a slope b from n pairs is too low on average: (1 + 3 b)/n in a record that moves about its level, whose slope
 * has the variance (1 - b^2)/n, or 6/n^2 where b is near 1. A record that begins far off its level tells the slope better,
 * and its bias is less in proportion to the variance.
 *
 * @see Marriott and Pope (1954), Biometrika 41:390; Kendall (1954), Biometrika 41:403: bias in the estimation of
 *   autocorrelations.
 */
function biasOf({ slope, error }: Slope, count: number): number {
  const usual = Math.max((1 - slope * slope) / count, 6 / count ** 2);
  return ((1 + 3 * slope) / count) * Math.min(1, error ** 2 / usual);
}

interface Slope {
  readonly slope: number;
  readonly error: number;
  /** The unknown that the slope follows most. */
  readonly name: string;
}

/**
 * The slope of a rule that is linear on the fitting scale, if the record gives both it and an intercept: the next value's
 * derivatives by the unknowns at the lowest and the highest level then point in different directions.
 */
function slopeBesideIntercept(fit: Omit<GroupFit, "warnings">, context: FitContext): Slope | undefined {
  const { rule, options, unknowns, found } = context;
  if (rule.states.length !== 1 || rule.lags.length > 0 || rule.inputs.length > 0) return undefined;
  place(unknowns, found.at);
  const ordered = fit.points.map(({ observed }) => observed).sort((a, b) => a - b);
  const [low, middle, high] = [0, ordered.length >> 1, ordered.length - 1].map((place) =>
    stepFrom(ordered[place]!, context),
  ) as [Step, Step, Step];
  const distance = onLogScale(options) ? Math.log(high.from / low.from) : high.from - low.from;
  const apart = Math.abs(high.slope - low.slope) + Math.abs(middle.slope - low.slope);
  if (!(distance > 0 && apart <= alike * Math.abs(middle.slope))) return undefined;
  if (areParallel(low.derivatives, high.derivatives)) return undefined;
  const follows = high.derivatives.map((value, k) => (value - low.derivatives[k]!) / distance);
  const variance = quadratic(found.covariance, follows);
  if (!(variance > 0)) return undefined;
  const size = follows.length;
  const shares = follows.map((value, k) => Math.abs(value) * Math.sqrt(found.covariance[k * (size + 1)]!));
  const name = unknowns.names[shares.indexOf(Math.max(...shares))]!;
  return { slope: middle.slope, error: Math.sqrt(variance), name };
}

/** One step of the rule: its slope, and its derivatives by the unknowns, on the fitting scale. */
interface Step {
  readonly from: number;
  readonly slope: number;
  readonly derivatives: Float64Array;
}

function stepFrom(from: number, { rule, options, unknowns }: FitContext): Step {
  const width = rule.parameters.length + 1;
  const path = new Float64Array(2);
  const sensitivities = new Float64Array(2 * width);
  const { pathWithSensitivities } = compileRule(rule);
  pathWithSensitivities(Float64Array.of(from), unknowns.parameters, [], 0, 1, path, sensitivities);
  const log = onLogScale(options);
  const by = (column: number): number => sensitivities[width + column]! / (log ? path[1]! : 1);
  return {
    from,
    slope: by(width - 1) * (log ? from : 1),
    derivatives: Float64Array.from(unknowns.columns, by),
  };
}

function areParallel(a: Float64Array, b: Float64Array): boolean {
  const dot = (x: Float64Array, y: Float64Array): number =>
    x.reduce((sum, value, k) => sum + value * y[k]!, 0);
  const [across, lengths] = [dot(a, b) ** 2, dot(a, a) * dot(b, b)];
  return !(lengths - across > alike * lengths);
}

function quadratic(matrix: Float64Array, vector: Float64Array): number {
  return matrix.reduce(
    (sum, entry, k) => sum + entry * vector[Math.floor(k / vector.length)]! * vector[k % vector.length]!,
    0,
  );
}
