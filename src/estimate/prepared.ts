import type { LinearisedSystem } from "../numeric/index.js";
import type { ObservedGroup } from "../record/index.js";
import { compileRule, type Rule } from "../rule/index.js";
import { type FitOptions, onLogScale } from "./fit-options.js";
import type { FitRows } from "./fit-rows.js";
import { normalEquations } from "./normal-equations.js";
import { oneStepRows } from "./one-step-rows.js";
import { oneStepSystem } from "./one-step-system.js";
import { recordedPath } from "./recorded-path.js";
import { trajectoryRows } from "./trajectory-rows.js";
import { trajectorySystem } from "./trajectory-system.js";
import type { Unknowns } from "./unknowns.js";

/** The values that a fit compares, and their least-squares system over the same unknowns. */
export interface Prepared {
  readonly rows: FitRows;
  readonly system: LinearisedSystem;
}

/** Makes a group ready to be fitted. */
export function prepared(
  rule: Rule,
  group: ObservedGroup,
  unknowns: Unknowns,
  options: FitOptions,
): Prepared {
  const compiled = compileRule(rule);
  if (options.errors === "process") {
    const { rows, steps } = oneStepRows(rule, compiled, group, unknowns, options);
    const generated = steps && compiled.stepSums?.(onLogScale(options));
    const system = generated ? oneStepSystem(generated, unknowns, steps) : normalEquations(rows);
    return { rows, system };
  }
  const recorded = recordedPath(rule, group, options);
  const rows = trajectoryRows(rule, compiled, unknowns, recorded);
  // Factors are not among the sums that the generated function gathers.
  const summed = options.factor === undefined && compiled.pathSums !== undefined;
  const system = summed
    ? trajectorySystem(compiled.pathSums(onLogScale(options)), unknowns, recorded)
    : normalEquations(rows);
  return { rows, system };
}
