import { type Fit, type GroupFit, problemOf } from "../../estimate/index.js";
import type { GroupCheck } from "./check.js";
import type { RecoveredUnknown } from "./recovery.js";
import { probabilityText, type ResidualTestKind } from "./residual-tests.js";
import type { Window } from "./windows.js";

type Found = Omit<GroupCheck, "concerns" | "sentence">;

/** Bias, in standard deviations of the refits, from which an estimate is called biased: common practice, no source. */
const biased = 0.5;
/** Shift, in standard errors, from which one end row decides an estimate: common practice, no source. */
const decisive = 1;

/** What the checks say against a fit. */
export function concernsOf(fit: Fit, group: GroupFit, found: Found): readonly string[] {
  return [
    ...(group.stop.kind === "converged"
      ? []
      : ["The search did not converge, so there is no fit to check yet."]),
    ...residualConcerns(fit, found),
    ...scatterConcerns(group),
    ...endConcerns(group, found.windows),
    ...found.lackOfFit.filter((test) => test.probability < 0.05).map((test) => test.sentence),
    ...recoveryConcerns(found),
    ...errorConcerns(fit, found),
  ];
}

/** One sentence on the whole. */
export function verdictOf(group: GroupFit, found: Found, concerns: readonly string[]): string {
  const { recovery } = found;
  const held = heldText(recovery);
  const size = `${group.count} residuals`;
  const open = found.errors?.kind === "undecided" ? [found.errors.sentence] : [];
  if (concerns.length === 0) return [`No evidence against this fit (${size}; ${held}).`, ...open].join(" ");
  const many = concerns.length === 1 ? "One finding" : `${concerns.length} findings`;
  return [`${many} against this fit (${size}; ${held}).`, ...concerns, ...open].join(" ");
}

/** Several tests ask after one thing, so each kind is answered once, by its clearest test. */
function residualConcerns(fit: Fit, { tests }: Found): string[] {
  const found: string[] = [];
  const serial = tests.filter(({ kind, sign }) => kind === "autocorrelation" && sign !== "none");
  const clearest =
    serial.find((test) => test.sign === "clear") ?? (serial.length > 1 ? serial[0] : undefined);
  if (clearest !== undefined)
    found.push(
      `Residuals of neighbouring periods are correlated (${clearest.name}: ${clearest.statistic.toFixed(2)}), so the rule or the kind of error is wrong and intervals are too narrow.`,
    );
  for (const { kind, probability } of tests.filter((test) => test.sign === "clear"))
    if (kind !== "autocorrelation") found.push(clearConcern(fit, kind, probability!));
  return found;
}

function clearConcern(
  fit: Fit,
  kind: Exclude<ResidualTestKind, "autocorrelation">,
  probability: number,
): string {
  const { distribution, scale } = problemOf(fit);
  const p = `p ${probabilityText(probability)}`;
  switch (kind) {
    case "normality":
      return `The residuals are not normal (${p}): look for single readings far out before quoting an interval.`;
    case "distribution":
      return distribution === "poisson"
        ? `The counts do not follow a Poisson distribution (${p}): write \`distribution: "negative-binomial"\`.`
        : `The values do not follow the ${distribution} distribution that was fitted (${p}): look for single readings far out.`;
    case "spread":
      return distribution === "normal" || scale.log
        ? `The scatter changes with the level (${p}): try \`distribution: "${scale.log ? "normal" : "lognormal"}"\`.`
        : `The scatter changes with the level by more than the ${distribution} distribution says (${p}).`;
  }
}

/** Counts that scatter more than their distribution allows: the size of it and the remedy. */
function scatterConcerns({ warnings }: GroupFit): string[] {
  return warnings.filter(({ code }) => code === "overdispersed").map(({ message }) => message);
}

/** An initial state leans on the first row by its nature, so only parameters are held against the ends. */
function endConcerns(group: GroupFit, windows: readonly Window[]): string[] {
  return windows
    .filter((window) => window.name.endsWith(" row"))
    .flatMap((window) =>
      window.estimates
        .filter(
          (estimate, i) =>
            group.estimates[i]!.role === "parameter" && Math.abs(estimate.shift ?? 0) > decisive,
        )
        .map(
          (estimate) =>
            `Fitted ${window.name}, ${estimate.name} moves by ${Math.abs(estimate.shift!).toFixed(1)} standard errors: that one row decides it.`,
        ),
    );
}

function heldText(recovery: Found["recovery"]): string {
  if (recovery === undefined)
    return "its intervals were not tried on simulated records, which censored values, weighted counts and groups fitted together do not allow";
  if (recovery.resamples === 0) return "no record could be simulated from it";
  const level = Math.round(100 * recovery.level);
  const fewest = Math.min(...recovery.parameters.map((unknown) => unknown.coverage));
  return `in ${recovery.resamples} records simulated from it, the ${level}% intervals held the true values in ${percent(fewest)} or more`;
}

function recoveryConcerns({ recovery }: Found): string[] {
  const found: string[] = [];
  if (recovery === undefined) return found;
  if (recovery.failed > 0.05 * (recovery.resamples + recovery.failed))
    found.push(
      `${recovery.failed} of ${recovery.resamples + recovery.failed} drawn records could not be refitted.`,
    );
  for (const unknown of recovery.parameters) {
    if (isBiased(unknown))
      found.push(
        `Refits of drawn records put ${unknown.name} too ${unknown.medianBias > 0 ? "high" : "low"}, by ${(Math.abs(unknown.medianBias) / unknown.deviation).toFixed(1)} of their standard deviation.`,
      );
    // Three Monte-Carlo errors below the level.
    const floor =
      recovery.level - 3 * Math.sqrt((recovery.level * (1 - recovery.level)) / recovery.resamples);
    if (unknown.coverage < floor)
      found.push(
        `The interval of ${unknown.name} held its true value in only ${percent(unknown.coverage)} of drawn records: it is too narrow.`,
      );
  }
  return found;
}

const isBiased = (unknown: RecoveredUnknown): boolean =>
  Math.abs(unknown.medianBias) > biased * unknown.deviation;

function errorConcerns(fit: Fit, { errors }: Found): string[] {
  const given = problemOf(fit).errors;
  const agrees = errors === undefined || errors.kind === "undecided" || errors.kind === given;
  return agrees || given === "both" ? [] : [errors.sentence];
}

const percent = (share: number): string => `${(100 * share).toFixed(0)}%`;
