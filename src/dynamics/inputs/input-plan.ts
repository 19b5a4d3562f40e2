import { nearestNames } from "../../numeric/index.js";
import { indexOf, labelAt, type PeriodAxis, periodWords } from "../../record/index.js";
import { badPlan, shortPlan } from "../refusals.js";

/**
 * What an input will be: one number throughout; a value for each period, the first of the projection first; or a
 * usual level with steps that last (`from`) and one-off events (`at`), by the label or number of the period as the
 * record has it. So `{ usual: 300, from: { "2027-06": 450 }, at: { "2027-12": 0 } }` pays 450 from June 2027 on and
 * nothing in December.
 */
export type LevelPlan =
  | number
  | ArrayLike<number>
  | {
      /** Level in every period that nothing else is said of. */
      readonly usual: number;
      /** Levels that hold from a period on, by its label or number. */
      readonly from?: Readonly<Record<string, number>>;
      /** Levels of single periods, by their labels or numbers. */
      readonly at?: Readonly<Record<string, number>>;
    };

/** One plan for all, or one a group: `{ byGroup: { A: 100, B: { usual: 300, at: { "2027-12": 0 } } } }`. */
export type InputPlan =
  | LevelPlan
  | {
      /** One plan a group, by its name. */
      readonly byGroup: Readonly<Record<string, LevelPlan>>;
    };

/** Plans by input. */
export type InputPlans = Readonly<Record<string, InputPlan>>;

/** The periods that a plan may speak of, by index on the axis, and how many of them need a value. */
export interface PlannedPeriods {
  readonly axis: PeriodAxis;
  readonly first: number;
  readonly last: number;
  readonly needed: number;
  /** The group that is projected; undefined where the rule runs without a record. */
  readonly group: string | undefined;
}

/** Whether a plan is one a group. */
export function isByGroup(plan: InputPlan): plan is Extract<InputPlan, { readonly byGroup: unknown }> {
  return typeof plan === "object" && "byGroup" in plan;
}

/**
 * The values of a plan, from the first period on.
 *
 * @throws {ModelError} `future-input-missing` | `plan-not-readable` | `unknown-name` (of a group).
 */
export function plannedValues(name: string, plan: InputPlan, periods: PlannedPeriods): Float64Array {
  const values = valuesOf(name, planOfGroup(name, plan, periods.group), periods);
  const bad = values.findIndex((value) => !Number.isFinite(value));
  if (bad < 0) return values;
  throw badPlan(
    name,
    `${periodWords(periods.axis, periods.first + bad)} has ${values[bad]}, which is not a finite number`,
  );
}

/** The plan that holds for one group. */
export function planOfGroup(name: string, plan: InputPlan, group: string | undefined): LevelPlan {
  if (!isByGroup(plan)) return plan;
  if (group === undefined)
    throw badPlan(name, "`byGroup` gives one plan a group, and no group of a record is projected here");
  if (Object.hasOwn(plan.byGroup, group)) return plan.byGroup[group]!;
  const named = Object.keys(plan.byGroup);
  const [near] = nearestNames(group, named);
  const hint = near === undefined ? "" : `. Did you mean it by "${near}"?`;
  throw badPlan(name, `\`byGroup\` has no plan for "${group}"; it has ${named.join(", ") || "none"}${hint}`);
}

function valuesOf(name: string, plan: LevelPlan, periods: PlannedPeriods): Float64Array {
  const { first, needed } = periods;
  if (typeof plan === "number") return new Float64Array(needed).fill(plan);
  if (typeof plan !== "object" || plan === null)
    throw badPlan(name, `${String(plan)} is neither a number, a list of numbers nor { usual, from, at }`);
  if ("length" in plan) {
    if (plan.length < needed) throw shortPlan(name, plan.length, needed);
    return Float64Array.from({ length: needed }, (_, i) => plan[i]!);
  }
  const strange = Object.keys(plan).find((key) => !parts.includes(key));
  if (strange !== undefined)
    throw badPlan(
      name,
      `it has no part \`${strange}\`. Write { usual, from, at }, or { byGroup: { ... } } for a plan a group`,
    );
  if (typeof plan.usual !== "number")
    throw badPlan(
      name,
      `\`usual\` is ${String(plan.usual)}. Write the level that holds where \`from\` and \`at\` say nothing`,
    );
  const steps = placed(name, "from", plan.from, periods).sort(([a], [b]) => a - b);
  const values = new Float64Array(needed).fill(plan.usual);
  for (const [index, value] of steps) values.fill(value, index - first);
  for (const [index, value] of placed(name, "at", plan.at, periods))
    if (index - first < needed) values[index - first] = value;
  return values;
}

const parts: readonly string[] = ["usual", "from", "at"];

/** Steps or events with the indexes of their periods; one outside the projection is refused, not passed over. */
function placed(
  name: string,
  part: string,
  given: Readonly<Record<string, number>> | undefined,
  { axis, first, last }: PlannedPeriods,
): [number, number][] {
  return Object.entries(given ?? {}).map(([label, value]) => {
    const index = indexOf(axis, label);
    if (index !== undefined && index >= first && index <= last) return [index, value];
    const why = index === undefined ? "is none of its periods" : "lies outside it";
    throw badPlan(
      name,
      `\`${part}\` speaks of ${label}, and the projection runs from ${labelAt(axis, first)} to ${labelAt(axis, last)}: ${label} ${why}`,
    );
  });
}
