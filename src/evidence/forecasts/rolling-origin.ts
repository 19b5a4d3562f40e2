import { type Fit, problemOf } from "../../estimate/index.js";
import type { Tick } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import { fitLabels } from "../compare/fit-labels.js";
import { type ForecastScores, type Scored, scoresOf } from "./forecast-scores.js";
import { type NaiveForecast, naiveForecasts } from "./naive-forecasts.js";
import type { Prediction } from "./predict-ahead.js";
import { fitUntil, predictFrom } from "./predict-from.js";

/** Forecasts made from several origins, each from the record up to it, and what came. */
export interface RollingOrigin {
  /** Origins, from each of which every rival was fitted afresh. */
  readonly origins: number;
  /** Periods ahead, at most. */
  readonly periods: number;
  /** Values that were forecast. */
  readonly forecasts: number;
  readonly level: number;
  /** The rivals in order, then the naive forecasts. */
  readonly scores: readonly ForecastScores[];
}

/** How far and from where to forecast. */
export interface OriginPlan {
  /** Rows left out behind each origin, at least 1. */
  readonly leftOut: readonly number[];
  /** Fits once, at the first origin, and only carries on from the later ones. */
  readonly fitOnce?: boolean;
  readonly horizon: number;
  readonly level: number;
  /** Called after each origin of each group. */
  readonly tick?: Tick;
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
  const logs = fits.map((fit) => problemOf(fit).scale.log);
  const naive = naiveForecasts(logs[0]!);
  const made = first.observations.groups.flatMap((group) => {
    const last = group.index.length - 1;
    const origins = plan.leftOut.map((rows) => last - rows).filter((origin) => origin >= 3);
    let trained: readonly (Fit | undefined)[] | undefined;
    return origins
      .map((origin) => {
        if (trained === undefined || !plan.fitOnce)
          trained = fits.map((fit) => fitUntil(fit, group.name, origin));
        plan.tick?.();
        return forecastsAt(fits, trained, naive, group, origin, plan.horizon);
      })
      .filter((forecasts) => forecasts.length > 0);
  });
  const scored = made.flat();
  if (scored.length === 0) return undefined;
  const names = [...fitLabels(fits), ...naive.map((each) => each.name)];
  const scores = names.map((name, i) =>
    scoresOf(
      name,
      i < fits.length ? "rule" : "naive",
      scored.map((rivals) => rivals[i]!),
      logs[i] ?? logs[0]!,
      plan.level,
    ),
  );
  return { origins: made.length, periods: plan.horizon, forecasts: scored.length, level: plan.level, scores };
}

/** What every rival and naive forecast said of each value after an origin; only values of which all said something. */
function forecastsAt(
  fits: readonly Fit[],
  trained: readonly (Fit | undefined)[],
  naive: readonly NaiveForecast[],
  group: ObservedGroup,
  origin: number,
  horizon: number,
): readonly (readonly Scored[])[] {
  const rivals = trained.map((own, i) => own && predictFrom(own, fits[i]!, group.name, origin, horizon));
  if (rivals.some((rival) => rival === undefined)) return [];
  return targetsOf(group, fits[0]!.rule.states, origin, horizon).flatMap((target) => {
    const all = [
      ...rivals.map((rival, i) => rival![target.ahead - 1]?.[placeOf(fits[i]!, target.state)]),
      ...naive.map((each) => each.predict(target.group, target.state, target.last, target.ahead)),
    ];
    if (all.some((prediction) => prediction === undefined)) return [];
    return [all.map((prediction) => scoredOn(target, prediction!))];
  });
}

/** Rules of one state may name it as they like. */
function placeOf({ rule }: Fit, state: string): number {
  return rule.states.length === 1 ? 0 : rule.states.indexOf(state);
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
