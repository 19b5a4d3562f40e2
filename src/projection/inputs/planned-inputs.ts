import { inputOffsets, type Rule } from "../../rule/index.js";
import { refuseFutureInput, refuseUnknownInput } from "../refusals.js";
import { type InputPlan, type InputPlans, plannedValues } from "./input-plan.js";

/** What is known of the inputs when a run begins. */
export interface KnownInputs {
  /** Recorded values of an input by absolute period, rows 0 to the last recorded; none in a simulation. */
  readonly recorded: (input: string) => ArrayLike<number>;
  /** How many rows are recorded. */
  readonly rows: number;
  /** Last absolute period that a path reaches. */
  readonly last: number;
  /** What the first planned row is called: 1 ahead of a record, 0 in a simulation. */
  readonly firstNumber: number;
}

/**
 * One column an input by absolute period: what is recorded, then what is planned.
 *
 * @throws {ModelError} `future-input-missing` | `plan-not-readable` | `unknown-input`.
 */
export function plannedInputs(rule: Rule, plans: InputPlans, known: KnownInputs): readonly Float64Array[] {
  for (const name of Object.keys(plans))
    if (!rule.inputs.includes(name)) throw refuseUnknownInput(name, rule.inputs);
  const reach = inputOffsets(rule);
  const needed = (slot: number): number => Math.max(0, known.last + reach[slot]![1] - known.rows);
  const missing = rule.inputs.filter((name, slot) => needed(slot) > 0 && plans[name] === undefined);
  if (missing.length > 0) {
    const count = Math.max(...rule.inputs.map((_, slot) => needed(slot)));
    throw refuseFutureInput(missing, count, known.rows === 0 ? 0 : known.last - known.rows + 1 - count);
  }
  return rule.inputs.map((name, slot) => {
    const count = needed(slot);
    const ahead = count === 0 ? [] : plannedValues(name, plans[name] as InputPlan, known.firstNumber, count);
    return Float64Array.from([...Array.from(known.recorded(name)), ...ahead]);
  });
}
