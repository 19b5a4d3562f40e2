import { refusePlan, refuseShortPlan } from "../refusals.js";

/**
 * What an input will be: one number throughout; a value for each period, the first of the projection first; or a
 * usual level with steps that last (`from`) and one-off events (`at`), by the number of the period. So
 * `{ usual: 300, from: { 13: 450 }, at: { 20: 0 } }` pays 450 from period 13 on and nothing in period 20.
 */
export type InputPlan =
  | number
  | ArrayLike<number>
  | {
      readonly usual: number;
      readonly from?: Readonly<Record<number, number>>;
      readonly at?: Readonly<Record<number, number>>;
    };

/** Plans by input. */
export type InputPlans = Readonly<Record<string, InputPlan>>;

/**
 * The values of a plan.
 *
 * @param first - number of the period that the first value is for.
 * @throws {ModelError} `future-input-missing` | `plan-not-readable`.
 */
export function plannedValues(name: string, plan: InputPlan, first: number, count: number): Float64Array {
  if (typeof plan === "number") return checked(name, new Float64Array(count).fill(plan), first);
  if ("length" in plan) {
    if (plan.length < count) throw refuseShortPlan(name, plan.length, count);
    return checked(
      name,
      Float64Array.from({ length: count }, (_, i) => plan[i]!),
      first,
    );
  }
  const steps = periodsOf(name, plan.from, first, count).sort(([a], [b]) => a - b);
  const values = new Float64Array(count).fill(plan.usual);
  for (const [period, value] of steps) values.fill(value, period - first);
  for (const [period, value] of periodsOf(name, plan.at, first, count)) values[period - first] = value;
  return checked(name, values, first);
}

/** Steps or events with their periods as numbers; one outside the projection is refused, not passed over. */
function periodsOf(
  name: string,
  given: Readonly<Record<number, number>> | undefined,
  first: number,
  count: number,
): [number, number][] {
  return Object.entries(given ?? {}).map(([key, value]) => {
    const period = Number(key);
    if (!Number.isInteger(period) || period < first || period >= first + count)
      throw refusePlan(name, `period ${key} lies outside periods ${first} to ${first + count - 1}`);
    return [period, value];
  });
}

function checked(name: string, values: Float64Array, first: number): Float64Array {
  const bad = values.findIndex((value) => !Number.isFinite(value));
  if (bad >= 0) throw refusePlan(name, `period ${first + bad} has ${values[bad]}, which is no finite number`);
  return values;
}
