import type { ObservedGroup } from "../record/index.js";
import type { CompiledRule, Rule } from "../rule/index.js";
import type { FitOptions } from "./fit-options.js";
import { oneStepRows } from "./one-step-rows.js";
import type { ResidualRows } from "./residual-rows.js";
import { trajectoryRows } from "./trajectory-rows.js";
import type { Unknowns } from "./unknowns.js";

/** The residuals that a fit's options ask for. */
export function rowsOf(
  rule: Rule,
  compiled: CompiledRule,
  group: ObservedGroup,
  unknowns: Unknowns,
  options: FitOptions,
): ResidualRows {
  const make = options.errors === "process" ? oneStepRows : trajectoryRows;
  return make(rule, compiled, group, unknowns, options.spread ?? "constant");
}
