import { type Rule, roughness } from "../../rule/index.js";
import {
  refuseFactor,
  refuseJumps,
  refuseMissingErrors,
  refuseRobust,
  refuseSpread,
  refuseUnknownSpread,
} from "../refusals.js";
import { bySquares, type FitOptions } from "./fit-options.js";

const errorKinds: readonly unknown[] = ["process", "observation", "both"];
const spreads: readonly unknown[] = ["constant", "proportional", "poisson", "negative-binomial"];

/** Refuses options that do not go together, and rules that no search can fit. */
export function checkOptions(rule: Rule, options: FitOptions): void {
  if (!errorKinds.includes(options?.errors)) throw refuseMissingErrors();
  checkSpread(options);
  if (options.factor !== undefined && options.errors !== "observation") throw refuseFactor(options.errors);
  const alone = (options.groups ?? "separate") === "separate";
  if (options.robust === true && !(bySquares(options) && alone)) throw refuseRobust();
  const [jump] = roughness(rule).jumps;
  if (jump !== undefined) throw refuseJumps(jump.function, rule.text);
}

function checkSpread({ errors, spread = "constant" }: FitOptions): void {
  if (typeof spread === "object") {
    const exact = spread.sd === 0 && errors === "both";
    if (!(spread.sd > 0 || exact)) throw refuseSpread(spread.sd);
    return;
  }
  const counts = spread === "poisson" || spread === "negative-binomial";
  if (errors === "both" && counts) throw refuseUnknownSpread(`${spread} with errors in both`);
  if (!spreads.includes(spread)) throw refuseUnknownSpread(spread);
}
