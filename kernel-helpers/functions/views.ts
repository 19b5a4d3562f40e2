import {
  type EstimateRow,
  estimates as estimatesOf,
  type Fit,
  type FitPoint,
  points as pointsOf,
  type SummaryRow,
  summary as summaryOf,
} from "../../src/estimate/index.js";
import { checkCall } from "../options/index.js";

/**
 * Every parameter and initial state of every group of a fit, a row each.
 *
 * @example estimates(fitted)[0].name; // "R"
 */
export function estimates(fit: Fit): readonly EstimateRow[] {
  checkCall("estimates", arguments);
  return estimatesOf(fit);
}

/**
 * Every observed value of every group of a fit with its fitted value and residual, a row each.
 *
 * @example points(fitted).length; // 19
 */
export function points(fit: Fit): readonly (FitPoint & { readonly group: string })[] {
  checkCall("points", arguments);
  return pointsOf(fit);
}

/**
 * Size, scatter, likelihood and the reason the search stopped, a row a group.
 *
 * @example summary(fitted).length; // 1
 */
export function summary(fit: Fit): readonly SummaryRow[] {
  checkCall("summary", arguments);
  return summaryOf(fit);
}
