import { labelAt, type PeriodAxis } from "../../record/index.js";
import { inputOffsets, type Rule } from "../../rule/index.js";
import { earlierInputMissing, futureInputMissing, unknownInput } from "../refusals.js";
import { type InputPlan, type InputPlans, plannedValues } from "./input-plan.js";

/** What is known of the inputs when a run begins; periods are indexes on the axis. */
export interface KnownInputs {
  readonly axis: PeriodAxis;
  /** The group that is projected; undefined without a record. */
  readonly group: string | undefined;
  /** Recorded values of an input by period, NaN where there is none. */
  readonly recorded: (input: string) => Float64Array;
  /** The period that the first step is taken from. */
  readonly from: number;
  /** The first period that is planned. */
  readonly first: number;
  /** The last period that the run reaches. */
  readonly last: number;
}

const noInput = new Float64Array(0);

/** Nothing is recorded of any input. */
export const nothingRecorded = (): Float64Array => noInput;

/**
 * One column an input by period: what is recorded before the first planned period, then what is planned. Recorded
 * values stand in for a plan that is not given, where the record has one for every period.
 *
 * @throws {ModelError} `future-input-missing` | `missing-input` | `plan-not-readable` | `unknown-input`.
 */
export function plannedInputs(rule: Rule, plans: InputPlans, known: KnownInputs): readonly Float64Array[] {
  for (const name of Object.keys(plans))
    if (!rule.inputs.includes(name)) throw unknownInput(name, rule.inputs);
  const reach = inputOffsets(rule);
  const needed = (slot: number): number => Math.max(0, known.last + reach[slot]![1] - known.first);
  const columns = rule.inputs.map((name, slot) => columnOf(name, plans[name], needed(slot), known));
  const missing = rule.inputs.filter((_, slot) => columns[slot] === undefined);
  if (missing.length === 0) return checked(rule, columns as readonly Float64Array[], known);
  const count = Math.max(...rule.inputs.map((_, slot) => needed(slot)));
  throw futureInputMissing(
    missing,
    count,
    known.group === undefined ? 0 : known.last - known.first + 1 - count,
  );
}

/** Steps may read inputs of before the first planned period; these must be recorded. */
function checked(
  rule: Rule,
  columns: readonly Float64Array[],
  { axis, from, first, last }: KnownInputs,
): readonly Float64Array[] {
  inputOffsets(rule).forEach(([earliest, latest], slot) => {
    const end = Math.min(first, last + latest);
    for (let index = from + earliest; index < end; index++)
      if (!Number.isFinite(columns[slot]![index]))
        throw earlierInputMissing(rule.inputs[slot]!, labelAt(axis, index));
  });
  return columns;
}

/** Undefined where periods have neither a plan nor a recorded value. */
function columnOf(
  name: string,
  plan: InputPlan | undefined,
  needed: number,
  { recorded, axis, group, first, last }: KnownInputs,
): Float64Array | undefined {
  const column = new Float64Array(first + needed).fill(Number.NaN);
  const known = recorded(name);
  column.set(known.subarray(0, plan === undefined ? column.length : first));
  if (plan !== undefined && needed > 0)
    column.set(plannedValues(name, plan, { axis, first, last, needed, group }), first);
  return plan === undefined && column.subarray(first).some(Number.isNaN) ? undefined : column;
}
