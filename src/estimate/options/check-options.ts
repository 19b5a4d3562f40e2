import { nonsmoothCalls, type Rule } from "../../rule/index.js";
import {
  factorError,
  invalidSdError,
  jumpsError,
  missingErrorsError,
  robustError,
  unknownDistributionError,
} from "../errors.js";
import { bySquares, type FitOptions } from "./fit-options.js";

const errorKinds: readonly unknown[] = ["process", "observation", "both"];
const distributions: readonly unknown[] = ["normal", "lognormal", "poisson", "negative-binomial"];

/** Refuses options that do not go together, and rules that no search can fit. */
export function checkOptions(rule: Rule, options: FitOptions): void {
  if (!errorKinds.includes(options?.errors)) throw missingErrorsError();
  checkDistribution(options);
  if (options.factor !== undefined && options.errors !== "observation") throw factorError(options.errors);
  const alone = (options.groups ?? "separate") === "separate";
  if (options.robust === true && !(bySquares(options) && alone)) throw robustError();
  const [jump] = nonsmoothCalls(rule).jumps;
  if (jump !== undefined) throw jumpsError(jump.function, rule.text);
}

function checkDistribution({ errors, distribution = "normal", sd }: FitOptions): void {
  if (!distributions.includes(distribution)) throw unknownDistributionError(distribution);
  const counts = distribution === "poisson" || distribution === "negative-binomial";
  if (errors === "both" && counts) throw unknownDistributionError(`${distribution} with errors in both`);
  if (sd === undefined) return;
  const exact = sd === 0 && errors === "both";
  const usable = typeof sd === "string" || sd > 0 || exact;
  if (counts || !usable) throw invalidSdError(sd, distribution);
}
