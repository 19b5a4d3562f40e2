import { type Fit, problemOf } from "../../estimate/index.js";
import { ruleLabel } from "../../rule/index.js";
import { refuseExactFit } from "../refusals.js";

/** Residuals below this share of the values are rounding of double precision, not scatter. */
const rounding = 1e-10;

/** Refuses a fit that leaves no scatter, of which no test, likelihood or drawn record can speak. */
export function refuseExact(fit: Fit): void {
  const { log } = problemOf(fit).scale;
  const exact = fit.groups.find(({ points }) => {
    const scale = log ? 1 : points.reduce((most, { observed }) => Math.max(most, Math.abs(observed)), 0);
    return points.every(({ residual }) => Math.abs(residual) <= rounding * scale);
  });
  if (exact !== undefined) throw refuseExactFit(ruleLabel(fit.rule), exact.group);
}
