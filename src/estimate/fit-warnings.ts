import type { Warning } from "../numeric/index.js";
import type { GroupFit } from "./group-fit.js";
import type { Unknowns } from "./unknowns.js";

/** Usable values a constant below which a fit carries a caution: common practice, no source. */
const comfortable = 8;
/** Correlation of two estimates above which they are named as hard to separate: common practice, no source. */
const strong = 0.99;

/** What a reader of the fit must know, besides its numbers. */
export function fitWarnings(fit: Omit<GroupFit, "warnings">, unknowns: Unknowns): readonly Warning[] {
  return [
    ...stopWarning(fit),
    ...undetermined(fit),
    ...atBounds(fit, unknowns),
    ...correlated(fit),
    ...fewValues(fit),
  ];
}

function stopWarning(fit: Omit<GroupFit, "warnings">): Warning[] {
  if (fit.stop.kind === "converged") return [];
  const why = fit.stop.kind === "failed" ? fit.stop.reason : "it ran out of iterations";
  return [
    {
      code: "not-converged",
      message: `The search did not converge (${why}): read the estimates as a last state, not as a fit. Give { start } or { bounds }.`,
    },
  ];
}

function undetermined(fit: Omit<GroupFit, "warnings">): Warning[] {
  return fit.estimates
    .filter((estimate) => estimate.standardError === undefined)
    .map((estimate) => ({
      code: "not-determined",
      message: `${estimate.name} is not determined by this record${estimate.profile.note && ` (${estimate.profile.note})`}.`,
    }));
}

function atBounds(fit: Omit<GroupFit, "warnings">, unknowns: Unknowns): Warning[] {
  return fit.estimates
    .filter((estimate, i) => estimate.value === unknowns.lower[i] || estimate.value === unknowns.upper[i])
    .map((estimate) => ({
      code: "at-bound",
      message: `${estimate.name} sits on its bound ${estimate.value}: its interval is one-sided at best.`,
    }));
}

function correlated(fit: Omit<GroupFit, "warnings">): Warning[] {
  const size = fit.estimates.length;
  const found: Warning[] = [];
  for (let a = 0; a < size; a++)
    for (let b = a + 1; b < size; b++) {
      const scale = fit.covariance[a * size + a]! * fit.covariance[b * size + b]!;
      const correlation = fit.covariance[a * size + b]! / Math.sqrt(scale);
      if (Math.abs(correlation) > strong)
        found.push({
          code: "strong-correlation",
          message: `${fit.estimates[a]!.name} and ${fit.estimates[b]!.name} are hard to separate (correlation ${correlation.toFixed(3)}): their combination is known better than either.`,
        });
    }
  return found;
}

function fewValues(fit: Omit<GroupFit, "warnings">): Warning[] {
  if (fit.count >= comfortable * fit.estimates.length) return [];
  return [
    {
      code: "few-values",
      message: `${fit.count} values for ${fit.estimates.length} unknowns: fewer than ${comfortable} each, so read the intervals as rough.`,
    },
  ];
}
