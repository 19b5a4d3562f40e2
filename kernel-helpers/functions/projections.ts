import type { Fit } from "../../src/estimate/index.js";
import {
  type Forecast as EngineForecast,
  type ForecastOptions,
  forecast as forecastFit,
  type SimulateOptions,
  simulate as simulateRule,
} from "../../src/projection/index.js";
import { type Rule, ruleLabel } from "../../src/rule/index.js";
import { checkCall } from "../options/index.js";
import {
  type Forecast,
  forecastWithValues,
  type Simulation,
  simulationWithValues,
} from "../results/index.js";
import { showing } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { seededRun } from "./seeded-run.js";
import { presentFit } from "./show-fit.js";
import { showForecast } from "./show-forecast.js";
import { showSimulation } from "./show-simulation.js";
import { shownTogether } from "./shown-together.js";

/**
 * Carries a fit forward; the result shows the path with its bands and the numbers at the recorded periods ahead.
 *
 * Inputs of the rule need a plan, or several as scenarios. The seed is the case's unless one is given.
 *
 * @example forecast(fitted, { periods: 20 });
 */
export function forecast(fit: Fit, options: ForecastOptions): Forecast {
  checkCall("forecast", arguments);
  const ahead = seededRun("Forecast", options, (own) => forecastFit(fit, own));
  caseLog.noteStep(
    `forecast "${ruleLabel(fit.rule)}" over ${options.periods} periods, ${ahead.options.paths} paths`,
  );
  caseLog.noteForecast(fit);
  return presentForecast(ahead);
}

/** Makes a forecast ready for a reader, and the fit that it holds. */
export function presentForecast(ahead: EngineForecast): Forecast {
  presentFit(ahead.fit);
  return showing(forecastWithValues(ahead), () => shownTogether(showForecast(ahead)));
}

/**
 * Runs a rule from given parameters, with random change where there is any; the result shows the paths, scenario by
 * scenario, with their bands.
 *
 * @example
 * const rule = recurrence("N[t+1] = R*N");
 * simulate(rule, { parameters: { R: 1.1 }, initial: { N: 100 }, periods: 2 }).groups[0].states[0].central.length // 3
 */
export function simulate(rule: Rule, options: SimulateOptions): Simulation {
  checkCall("simulate", arguments);
  const run = seededRun("Simulation", options, (own) => simulateRule(rule, own));
  caseLog.noteStep(
    `simulated "${ruleLabel(rule)}" over ${options.periods} periods, ${run.options.paths} paths`,
  );
  return showing(simulationWithValues(run), () => shownTogether(showSimulation(run)));
}
