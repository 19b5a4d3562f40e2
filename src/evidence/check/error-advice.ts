import { type Fit, type GroupFit, problemOf, type RecordDraw, type Refitter } from "../../estimate/index.js";
import { ModelError, type RandomStream, type Tick } from "../../numeric/index.js";
import { autocorrelations } from "../statistics/autocorrelation.js";
import { residualSeries } from "./residual-series.js";

/** A kind of error that stands alone. */
type Single = "process" | "observation";

/** Where the scatter of a record seems to lie, and what speaks for it. */
export interface ErrorAdvice {
  readonly kind: Single | "undecided";
  /** Log-likelihood with errors in the observation less that with errors in the process, of the values after the first. */
  readonly difference: number;
  /** Mean and standard deviation of that difference in records drawn with errors of each kind. */
  readonly expected: Readonly<Record<Single, { readonly mean: number; readonly deviation: number }>>;
  /** Weight of "observation" against "process", 0 to 1. */
  readonly weight: number;
  /** Correlation of neighbouring residuals of each fit. */
  readonly lagOne: Readonly<Record<Single, number>>;
  readonly sentence: string;
}

/** Weight from which one kind is advised. */
const decided = 0.8;
/** Deviations from both expectations beyond which neither kind alone fits. */
const strange = 3;

/**
 * Which kind of error a record speaks for: the rule is fitted with each, and the difference of the two
 * log-likelihoods is held against what it comes to in records drawn from each fit.
 *
 * The bare difference favours the observation, whose path can bend after the fact; drawing records from both fits
 * takes that out (the test of separate families by simulation).
 *
 * @param draws - records drawn with each kind.
 * @returns undefined where one of the two fits cannot be had.
 * @see Cox, D. R. (1962), Further results on tests of separate families of hypotheses, Journal of the Royal
 *   Statistical Society B 24; Williams, D. A. (1970), Discrimination between regression models, Biometrics 26.
 */
export function errorAdvice(
  fit: Fit,
  group: GroupFit,
  draws: number,
  stream: RandomStream,
  tick: Tick = () => undefined,
): ErrorAdvice | undefined {
  const process = sideOf(fit, group, "process");
  const observation = sideOf(fit, group, "observation");
  if (process === undefined || observation === undefined) return undefined;
  const measure = differenceOf(process, observation);
  const difference = measure(process.again.recorded);
  const expected = {
    process: expectedOf(process, measure, draws, stream, tick),
    observation: expectedOf(observation, measure, draws, stream, tick),
  };
  const weight =
    1 /
    (1 + Math.exp(logDensity(difference, expected.process) - logDensity(difference, expected.observation)));
  const away = (kind: Single): number =>
    Math.abs(difference - expected[kind].mean) / expected[kind].deviation;
  const neither = Math.min(away("process"), away("observation")) > strange;
  const kind = neither || Number.isNaN(weight) ? "undecided" : kindOf(weight);
  const lagOne = { process: lagOneOf(process), observation: lagOneOf(observation) };
  const advice = { kind, difference, expected, weight, lagOne } as const;
  return { ...advice, sentence: sentenceOf(advice, neither, group.count) };
}

interface Side {
  readonly fit: Fit;
  readonly group: GroupFit;
  readonly again: Refitter;
  readonly draw: RecordDraw;
}

/** The fit of one kind, taken over where it is the one given. */
function sideOf(given: Fit, group: GroupFit, errors: Single): Side | undefined {
  const problem = problemOf(given);
  const same = problem.groups === "separate" && problem.errors === errors;
  const fit = same ? given : otherFit(given, group, errors);
  const own = fit?.groups.find((each) => each.group === group.group);
  if (fit === undefined || own === undefined || !(own.sigma > 0)) return undefined;
  const { kind, refitter } = problemOf(fit).group(own.group);
  const again = kind === "least-squares" ? refitter() : undefined;
  return again?.draw && { fit, group: own, again, draw: again.draw };
}

function otherFit(given: Fit, group: GroupFit, errors: Single): Fit | undefined {
  const groups = given.observations.groups.filter((each) => each.name === group.group);
  try {
    const observations = { ...given.observations, groups };
    return problemOf(given).refit({ observations, errors, intervals: "none" });
  } catch (cause) {
    // Too few pairs for the other kind, for instance: then there is nothing to compare.
    if ((cause as Error).name === ModelError.name) return undefined;
    throw cause;
  }
}

/** The difference of log-likelihoods of the values that both compare, for a record [rows, states]. */
function differenceOf(process: Side, observation: Side): (values: Float64Array) => number {
  const { rows } = observation.again;
  const shared = new Set(process.again.rows.entries);
  const own = Array.from(rows.entries, (_, i) => i).filter((i) => !shared.has(rows.entries[i]!));
  const count = process.again.rows.count;
  return (values) => {
    process.again.take(values);
    observation.again.take(values);
    const steps = process.again.minimise(process.again.at);
    const path = observation.again.minimise(observation.again.at);
    rows.prepare(path.estimates, false);
    const sum = own.reduce((left, i) => left - rows.residualAt(i) ** 2, path.value);
    return (-count / 2) * Math.log(sum / steps.value);
  };
}

function expectedOf(
  { draw }: Side,
  measure: (values: Float64Array) => number,
  draws: number,
  stream: RandomStream,
  tick: Tick,
): { readonly mean: number; readonly deviation: number } {
  const found: number[] = [];
  for (let tries = 0; found.length < draws && tries < 2 * draws; tries++) {
    const values = draw(stream);
    const difference = values ? measure(values) : Number.NaN;
    if (Number.isFinite(difference)) found.push(difference);
    tick();
  }
  const mean = found.reduce((sum, value) => sum + value, 0) / found.length;
  const squares = found.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { mean, deviation: Math.sqrt(squares / (found.length - 1)) };
}

function logDensity(value: number, { mean, deviation }: { mean: number; deviation: number }): number {
  return -Math.log(deviation) - 0.5 * ((value - mean) / deviation) ** 2;
}

function kindOf(weight: number): ErrorAdvice["kind"] {
  if (weight >= decided) return "observation";
  return weight <= 1 - decided ? "process" : "undecided";
}

function lagOneOf({ fit, group }: Side): number {
  const own = group.points.filter(({ state }) => state === fit.rule.states[0]!);
  const series = residualSeries(
    own.map(({ index }) => index),
    own.map(({ residual }) => residual),
  );
  return autocorrelations(series, 1)[0]!;
}

function sentenceOf(advice: Omit<ErrorAdvice, "sentence">, neither: boolean, count: number): string {
  const { lagOne, weight } = advice;
  const limit = (1.96 / Math.sqrt(count)).toFixed(2);
  const evidence =
    `neighbouring residuals correlate ${lagOne.process.toFixed(2)} step by step and ${lagOne.observation.toFixed(2)} ` +
    `along the whole path, by chance within ±${limit}`;
  if (neither)
    return `The scatter fits neither errors in the reading alone nor errors in the change alone (${evidence}): both, or a wrong rule.`;
  const percent = Math.round(100 * Math.max(weight, 1 - weight));
  if (advice.kind === "undecided")
    return `The record does not tell whether the scatter lies in the reading or in the change itself (${evidence}). Carry both forward.`;
  const place = advice.kind === "observation" ? "in the reading" : "in the change itself";
  return `The scatter lies ${place} (weight ${percent}%; ${evidence}): use { errors: "${advice.kind}" }.`;
}
