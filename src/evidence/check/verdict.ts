import { type Fit, type GroupFit, problemOf } from "../../estimate/index.js";
import type { GroupCheck } from "./check.js";
import type { RecoveredUnknown } from "./recovery.js";
import { probabilityText } from "./residual-tests.js";
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
    ...residualConcerns(found),
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
  if (concerns.length === 0)
    return [`Nothing in the checks speaks against this fit (${size}; ${held}).`, ...open].join(" ");
  const many = concerns.length === 1 ? "One thing speaks" : `${concerns.length} things speak`;
  return [`${many} against this fit (${size}; ${held}).`, ...concerns, ...open].join(" ");
}

/** Several tests ask after one thing, so each question is answered once, by its clearest test. */
function residualConcerns({ tests }: Found): string[] {
  const related = tests.filter((test) => test.sign !== "none");
  const serial = related.filter((test) => /lag|Ljung|Runs/.test(test.name));
  const clearest =
    serial.find((test) => test.sign === "clear") ?? (serial.length > 1 ? serial[0] : undefined);
  const found: string[] = [];
  if (clearest !== undefined)
    found.push(
      `Residuals of neighbouring periods go together (${clearest.name.toLowerCase()}: ${clearest.statistic.toFixed(2)}), so the rule or the kind of error is wrong and intervals are too narrow.`,
    );
  const clear = (name: string): boolean => tests.some((test) => test.name === name && test.sign === "clear");
  if (clear("Shapiro-Wilk"))
    found.push("The residuals are not normal: look for single readings far out before quoting an interval.");
  const spread = tests.find((test) => test.name === "Spread on level" && test.sign === "clear");
  if (spread)
    found.push(
      `The scatter changes with the level (p ${probabilityText(spread.probability!)}): try { distribution: "lognormal" } or "normal".`,
    );
  return found;
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
    return "its intervals were not tried on drawn records, which counts, censored values and groups fitted together do not allow";
  if (recovery.resamples === 0) return "no record could be drawn from it";
  const level = Math.round(100 * recovery.level);
  const fewest = Math.min(...recovery.parameters.map((unknown) => unknown.coverage));
  return `in ${recovery.resamples} records drawn from it, the ${level}% intervals held the true values in ${percent(fewest)} or more`;
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
