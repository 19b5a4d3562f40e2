import { type Fit, fit as fitRule, type GroupFit } from "../../estimate/index.js";
import { ModelError } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import { type ForecastScores, type Scored, scoresOf } from "./forecast-scores.js";
import { type NaiveForecast, naiveForecasts } from "./naive-forecasts.js";
import { type Prediction, predictAhead } from "./predict-ahead.js";
import { recordUntil } from "./record-until.js";

/** Forecasts made from several origins, each from the record up to it, and what came. */
export interface RollingOrigin {
  /** Origins, from each of which every rival was fitted afresh. */
  readonly origins: number;
  /** Periods ahead, at most. */
  readonly horizon: number;
  /** Values that were forecast. */
  readonly forecasts: number;
  readonly level: number;
  /** The rivals in order, then the naive forecasts. */
  readonly scores: readonly ForecastScores[];
}

/** How far and from where to forecast. */
export interface OriginPlan {
  readonly origins: number;
  readonly horizon: number;
  readonly level: number;
}

interface Target {
  readonly group: ObservedGroup;
  readonly state: string;
  readonly row: number;
  readonly last: number;
  readonly ahead: number;
}

/**
 * Fits every rival afresh at each origin to what was recorded until then, forecasts what came after, and scores rivals
 * and naive forecasts on the same values. A forecast counts only where all of them could be made.
 *
 * @see Tashman, L. J. (2000), Out-of-sample tests of forecasting accuracy, International Journal of Forecasting 16.
 */
export function rollingOrigin(fits: readonly Fit[], plan: OriginPlan): RollingOrigin | undefined {
  const [first] = fits;
  if (first === undefined) return undefined;
  const logs = fits.map((fit) => fit.options.spread === "proportional");
  const naive = naiveForecasts(logs[0]!);
  const made = first.observations.groups.flatMap((group) => {
    const last = group.index.length - 1;
    const from = Math.max(3, last - plan.origins);
    return Array.from({ length: Math.max(0, last - from) }, (_, i) =>
      forecastsAt(fits, naive, group, from + i, plan.horizon),
    ).filter((forecasts) => forecasts.length > 0);
  });
  const scored = made.flat();
  if (scored.length === 0) return undefined;
  const names = [...fits.map((fit) => fit.rule.text), ...naive.map((each) => each.name)];
  const scores = names.map((name, i) =>
    scoresOf(
      name,
      i < fits.length ? "rule" : "naive",
      scored.map((rivals) => rivals[i]!),
      logs[i] ?? logs[0]!,
      plan.level,
    ),
  );
  return { origins: made.length, horizon: plan.horizon, forecasts: scored.length, level: plan.level, scores };
}

/** What every rival and naive forecast said of each value after an origin; only values of which all said something. */
function forecastsAt(
  fits: readonly Fit[],
  naive: readonly NaiveForecast[],
  group: ObservedGroup,
  origin: number,
  horizon: number,
): readonly (readonly Scored[])[] {
  const { states } = fits[0]!.rule;
  const rivals = fits.map((fit) => aheadOf(fit, group, origin, horizon));
  if (rivals.some((rival) => rival === undefined)) return [];
  return targetsOf(group, states, origin, horizon).flatMap((target) => {
    const s = states.indexOf(target.state);
    const all = [
      ...rivals.map((rival) => rival![target.ahead - 1]![s]),
      ...naive.map((each) => each.predict(target.group, target.state, target.last, target.ahead)),
    ];
    if (all.some((prediction) => prediction === undefined)) return [];
    return [all.map((prediction) => scoredOn(target, prediction!))];
  });
}

/** A fit's predictions from an origin; undefined where it cannot be fitted there. */
function aheadOf(
  fit: Fit,
  group: ObservedGroup,
  origin: number,
  horizon: number,
): readonly (readonly Prediction[])[] | undefined {
  const periods = Math.min(horizon, group.index[group.index.length - 1]! - group.index[origin]!);
  try {
    const refitted = fitRule(fit.rule, recordUntil(fit.observations, group, origin), {
      ...fit.options,
      start: { ...startOf(fit, group.name), ...fit.options.start },
      intervals: "none",
    });
    return predictAhead(refitted, refitted.groups[0]!, group, periods);
  } catch (cause) {
    // Too few rows yet, for instance: then this origin is passed over for all rivals.
    if ((cause as Error).name === ModelError.name) return undefined;
    throw cause;
  }
}

/** The whole record's estimates only tell where to look first; the search ends at the optimum of what was known. */
function startOf(fit: Fit, name: string): Record<string, number> {
  const group: GroupFit | undefined = fit.groups.find((each) => each.group === name);
  return Object.fromEntries(
    (group?.estimates ?? [])
      .filter((estimate) => estimate.role === "constant")
      .map((estimate) => [estimate.name, estimate.value]),
  );
}

function targetsOf(
  group: ObservedGroup,
  states: readonly string[],
  origin: number,
  horizon: number,
): Target[] {
  const targets: Target[] = [];
  for (let row = origin + 1; row < group.index.length; row++) {
    const ahead = group.index[row]! - group.index[origin]!;
    if (ahead > horizon) break;
    for (const state of states) targets.push({ group, state, row, last: origin, ahead });
  }
  return targets;
}

function scoredOn({ group, state, row, last }: Target, prediction: Prediction): Scored {
  return {
    ...prediction,
    value: group.values[state]![row]!,
    before: group.values[state]!.subarray(0, last + 1),
  };
}
