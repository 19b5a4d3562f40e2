import type { Fit } from "../estimate/index.js";
import { randomStream } from "../numeric/index.js";
import { checkRun } from "./check-run.js";
import { forecastGroup } from "./forecast-group.js";
import type { ForecastOptions, ForecastSettings } from "./forecast-options.js";
import { checkPlansByGroup, checkStartsByGroup } from "./inputs/plans-by-group.js";
import { scenariosOf } from "./inputs/scenarios.js";
import type { GroupForecast } from "./projected-group.js";

/** A fit carried forward, with its uncertainties kept apart. */
export interface Forecast {
  readonly kind: "forecast";
  readonly fit: Fit;
  readonly options: ForecastSettings;
  /** One a group of the record and scenario. */
  readonly groups: readonly GroupForecast[];
}

/**
 * Carries a fit forward: the path at the estimates, and bands from drawn parameters without (`mean path`) and with
 * (`future observation`) the errors of single values.
 *
 * Parameters are drawn from a multivariate t around the estimates, sigma with them, or along the profile where the
 * record leaves one open or its profile is bent; draws are kept in proportion to the likelihood of the record. With errors in the observation the rule runs from its initial state and the reading's error is added on top;
 * with errors in the process it runs from the last recorded value and every step has its own error.
 *
 * A rule whose nearby paths part (positive Lyapunov exponent) keeps its point path only up to the horizon of
 * predictability; beyond it stand the bands, with a warning.
 *
 * @returns per group and scenario central path, bands [index] in the state's unit, and the draws themselves.
 * @throws {ModelError} `periods-not-whole` | `future-input-missing` | `plan-not-by-group` | `start-not-readable` |
 *   `parameters-not-separated` | `no-finite-path` |
 *   `history-missing` | `no-draw-in-bounds`.
 * @example forecast(fitted, { periods: 12 }).groups[0].states[0].central.length; // recorded periods + 12
 */
export function forecast(fit: Fit, options: ForecastOptions): Forecast {
  const { periods, levels = [0.5, 0.8, 0.95], paths = 4000, seed = 1 } = options;
  checkRun(periods, paths, levels);
  const settings = { periods, levels, paths, seed };
  const scenarios = scenariosOf(options);
  for (const { plans } of scenarios) checkPlansByGroup(fit, plans);
  checkStartsByGroup(fit, options.from);
  let stream = randomStream(seed);
  const groups = fit.groups.flatMap((group) => {
    const own = stream;
    stream = stream.jump();
    return forecastGroup(fit, group, scenarios, { ...options, ...settings }, own);
  });
  return {
    kind: "forecast",
    fit,
    options: settings,
    groups,
  };
}
