import { isFrame, isPlain, isPromise } from "./written.js";

/** What a function may take before its options. */
export type ArgumentKind =
  | "rule"
  | "fit"
  | "fits"
  | "observations"
  | "forecast"
  | "simulation"
  | "record"
  | "differences"
  | "result"
  | "frame"
  | "table"
  | "anything";

const kindOf = (value: unknown): unknown =>
  typeof value === "object" && value !== null ? (value as { kind?: unknown }).kind : undefined;

/** Whether a value can be taken for one of a kind; what it holds is looked at where it is used. */
export function isOf(kind: ArgumentKind, value: unknown): boolean {
  switch (kind) {
    case "anything":
      return true;
    case "fits":
      return Array.isArray(value) && value.every((each) => kindOf(each) === "fit");
    case "frame":
      return isFrame(value);
    case "result":
      return typeof kindOf(value) === "string";
    case "record":
      return isRecord(value);
    default:
      return kindOf(value) === kind;
  }
}

/** Results that are no rows of a record. */
const results: readonly unknown[] = ["fit", "rule", "observations", "forecast", "simulation"];

function isRecord(value: unknown): boolean {
  if (isFrame(value) || kindOf(value) === "observations") return true;
  if (Array.isArray(value)) return !results.includes(kindOf(value[0]));
  return isPlain(value) && typeof kindOf(value) !== "string" && !isPromise(value);
}

/** What a kind is called in a message. */
export const argumentWords: Readonly<Record<ArgumentKind, string>> = {
  rule: "a rule",
  fit: "a fit",
  fits: "fits",
  observations: "observations",
  forecast: "a forecast",
  simulation: "a simulation",
  record: "a record (a DataFrame, rows as objects, or columns by name)",
  differences: "differences",
  result: "a result",
  frame: "a DataFrame",
  table: "a table",
  anything: "a value",
};

/** What to do where a kind is wanted and something else was given, by what that is; "" for whatever else. */
const advice: Readonly<Partial<Record<ArgumentKind, Readonly<Record<string, string>>>>> = {
  rule: {
    string: "Call `recurrence(text)` first",
    fit: "Give `fit.rule`",
    function: "Call it for its rule, as in `rules.logistic()`",
    "": 'Call `recurrence("N[t+1] = R*N")` first',
  },
  fit: {
    forecast: "Give `forecast.fit`",
    "updated-fit": "Give `updated.fit`",
    list: "Call it for each of them",
    "": 'Call `fit(rule, observations, { errors: "observation" })` first',
  },
  fits: { "": 'Call `fit(rule, observations, { errors: "observation" })` for each rule first' },
  observations: {
    fit: "Give `fit.observations`",
    "": 'Call `observations(record, { period: "month", step: "month", value: "owed" })` first',
  },
  forecast: { "": "Call `forecast(fit, { periods: 12 })` first" },
  simulation: { rule: "Call `simulate(rule, { parameters, initial, periods: 12 })` first" },
  record: {
    "": 'Read a file with `await readRecord("loan.csv")`, or give `{ month: [1, 2], owed: [900, 820] }`',
  },
  differences: { "": "Call `differences(observations)` first" },
  frame: { "": "Call `frame(record)` first" },
  table: { "": "Call `table({ title, columns, rows })` first" },
  result: { "": "Give what a function of this package returned" },
};

/** The next step for someone who gave a value where one of some kinds is wanted. */
export function adviceFor(wanted: readonly ArgumentKind[], value: unknown): string {
  if (typeof value === "object" && value !== null && isPromise(value)) return "Put `await` before it";
  const given = Array.isArray(value) ? "list" : String(kindOf(value) ?? typeof value);
  const steps = wanted.map((kind) => advice[kind] ?? {});
  return steps.find((step) => step[given])?.[given] ?? steps.find((step) => step[""])?.[""] ?? "";
}
