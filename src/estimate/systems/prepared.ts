import type { LinearisedSystem } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import { compileRule, type Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import type { FitRows } from "../rows/fit-rows.js";
import { oneStepRows } from "../rows/one-step-rows.js";
import { recordedPath } from "../rows/recorded-path.js";
import { trajectoryRows } from "../rows/trajectory-rows.js";
import type { Unknowns } from "../unknowns/unknowns.js";
import { normalEquations } from "./normal-equations.js";
import { oneStepSystem } from "./one-step-system.js";
import { trajectorySystem } from "./trajectory-system.js";

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
