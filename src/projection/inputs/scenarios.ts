import type { InputPlans } from "../../dynamics/index.js";
import { refuseNoScenario, refuseTwoPlans } from "../refusals.js";

/** Plans of inputs by the scenario's name, in the order in which they are shown. */
export type Scenarios = Readonly<Record<string, InputPlans>>;

/** One plan with its name. */
export interface Scenario {
  /** "" for the only one. */
  readonly name: string;
  readonly plans: InputPlans;
}

/** The scenarios asked for; a single one without a name where only `inputs`, or nothing, was given. */
export function scenariosOf(options: {
  readonly inputs?: InputPlans;
  readonly scenarios?: Scenarios;
}): readonly Scenario[] {
  const { inputs, scenarios } = options;
  if (scenarios === undefined) return [{ name: "", plans: inputs ?? {} }];
  if (inputs !== undefined) throw refuseTwoPlans();
  const named = Object.entries(scenarios);
  if (named.length === 0) throw refuseNoScenario();
  return named.map(([name, plans]) => ({ name, plans }));
}
