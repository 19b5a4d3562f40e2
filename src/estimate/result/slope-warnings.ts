import type { Warning } from "../../numeric/index.js";
import { compileRule } from "../../rule/index.js";
import { onLogScale } from "../options/fit-options.js";
import { place } from "../unknowns/unknowns.js";
import type { FitContext } from "./fit-warnings.js";
import type { GroupFit } from "./group-fit.js";

/** Slope from which on intervals of a one-step fit lose coverage in short records. */
const nearUnitRoot = 0.85;

/**
 * The small-sample bias of the slope of a one-step fit, about -(1 + 3 b)/n, and what a slope near 1 does to intervals.
 *
 * @see Marriott and Pope (1954), Biometrika 41:390; Kendall (1954), Biometrika 41:403: bias in the estimation of
 *   autocorrelations.
 */
export function slopeWarnings(fit: Omit<GroupFit, "warnings">, context: FitContext): Warning[] {
  const slope = context.options.errors === "process" ? slopeAt(fit, context) : undefined;
  if (slope === undefined) return [];
  const bias = -(1 + 3 * slope) / fit.count;
  const shown = `Slope of the next value on the present one ${slope.toFixed(3)}`;
  const found: Warning[] = [
    {
      code: "slope-bias",
      message: `${shown}: in records of ${fit.count} pairs a one-step estimate is off by about ${bias.toFixed(3)} on average.`,
    },
  ];
  if (Math.abs(slope) >= nearUnitRoot)
    found.push({
      code: "near-unit-root",
      message: `${shown}, near 1: profile and Wald intervals cover less than they state. Ask gridInterval(fit, name), which simulates at every value.`,
    });
  return found;
}

/** Slope of one step at the middle of the record, on the fitting scale, for a rule with one state that has parameters. */
function slopeAt(
  fit: Omit<GroupFit, "warnings">,
  { rule, options, unknowns, found }: FitContext,
): number | undefined {
  if (rule.states.length !== 1 || rule.lags.length > 0 || rule.inputs.length > 0) return undefined;
  place(unknowns, found.at);
  const ordered = fit.points.map(({ observed }) => observed).sort((a, b) => a - b);
  const middle = ordered[ordered.length >> 1]!;
  const width = rule.parameters.length + 1;
  const path = new Float64Array(2);
  const sensitivities = new Float64Array(2 * width);
  compileRule(rule).pathWithSensitivities(
    Float64Array.of(middle),
    unknowns.parameters,
    [],
    0,
    1,
    path,
    sensitivities,
  );
  const raw = sensitivities[2 * width - 1]!;
  const slope = onLogScale(options) ? (raw * middle) / path[1]! : raw;
  return Number.isFinite(slope) && slope !== 0 ? slope : undefined;
}
