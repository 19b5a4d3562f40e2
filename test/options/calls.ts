import * as periodwise from "../../kernel-helpers/index.js";
import type { FunctionSchema } from "../../kernel-helpers/options/function-schema.js";
import { functions } from "../../kernel-helpers/options/functions.js";

const { fit, forecast, observations, recurrence, rules, simulate } = periodwise;

const week = [0, 1, 2, 3, 4, 5, 6, 7, 8, 9];
const N = [10, 18, 31, 50, 69, 85, 93, 97, 99, 100];
const record = { week, N };
const observed = observations(record, { period: "week", step: "week", value: "N" });
const rule = recurrence("ΔN = r*N*(1 - N/K)", { fixed: { r: 0.8, K: 100 }, initial: { N: 10 } });
const fitted = fit(rules.logistic(), observed, { errors: "observation" });
const other = fit(rules.bevertonHolt(), observed, { errors: "observation" });
const [title, columns, rows] = ["Levels", [{ key: "n", label: "Week", kind: "integer" }], [{ n: 1 }]];

/** What the examples of the schemas and the suggestions of the errors speak of. */
export const scope: Readonly<Record<string, unknown>> = {
  ...periodwise,
  record,
  readings: periodwise.frame(record),
  observations: observed,
  laterObservations: observed,
  rule,
  fit: fitted,
  first: fitted,
  second: other,
  ahead: forecast(fitted, { periods: 3 }),
  simulation: simulate(rule, { periods: 3 }),
  controller: new AbortController(),
  y: [1, 2],
  title,
  columns,
  rows,
};

/** The value of a piece of code in that scope, in which some names may mean something else. */
export function evaluate(code: string, others: Readonly<Record<string, unknown>> = {}): unknown {
  const all = { ...scope, ...others };
  return new Function(...Object.keys(all), `return (${code});`)(...Object.values(all));
}

/** A public function as a caller from plain JavaScript has it. */
export function publicFunction(name: string): (...given: readonly unknown[]) => unknown {
  const [first = "", second] = name.split(".");
  const own = (periodwise as Readonly<Record<string, unknown>>)[first];
  return (second === undefined ? own : (own as Readonly<Record<string, unknown>>)[second]) as never;
}

/** The arguments of the call that a schema gives as its example. */
export function exampleCall({ name, example }: FunctionSchema): readonly unknown[] {
  const [first = "", second] = name.split(".");
  const own = (...given: readonly unknown[]): readonly unknown[] => given;
  return evaluate(example.replace(/^await /, ""), {
    [first]: second === undefined ? own : { [second]: own },
  }) as readonly unknown[];
}

/** What was said when a call was refused; undefined where it was not. */
export async function refusal(act: () => unknown): Promise<(Error & { readonly code?: string }) | undefined> {
  try {
    await act();
    return undefined;
  } catch (error) {
    return error as Error;
  }
}

export const schemas: readonly FunctionSchema[] = [...functions.values()];
