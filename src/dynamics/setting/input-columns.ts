import { inputOffsets, type Rule } from "../../rule/index.js";
import { missingInput, missingValue, strangeName } from "../refusals.js";

/** By input: one value a period from period 0, or one number that holds throughout. */
export type InputValues = Readonly<Record<string, ArrayLike<number> | number>>;

/** Refuses a column that has no finite value in one of the periods first..last. */
function checkColumn(name: string, column: Float64Array, first: number, last: number): void {
  if (first < 0) throw missingInput(name, first, column.length);
  for (let t = first; t <= last; t++) {
    if (t >= column.length || !Number.isFinite(column[t])) throw missingInput(name, t, column.length);
  }
}

/** The input columns that a path needs, by slot, each checked to reach as far as the path does. */
export function inputColumns(
  rule: Rule,
  given: InputValues = {},
  from = 0,
  periods = 0,
): readonly Float64Array[] {
  for (const name of Object.keys(given)) {
    if (!rule.inputs.includes(name)) throw strangeName("input", name, rule.inputs);
  }
  const reach = inputOffsets(rule);
  return rule.inputs.map((name, slot) => {
    if (!Object.hasOwn(given, name)) throw missingValue("input", name, Object.keys(given));
    const [earliest, latest] = reach[slot]!;
    const last = from + periods - 1 + latest;
    const values = given[name]!;
    if (typeof values === "number") return new Float64Array(Math.max(0, last + 1)).fill(values);
    const column = Float64Array.from(values);
    if (periods > 0) checkColumn(name, column, from + earliest, last);
    return column;
  });
}
