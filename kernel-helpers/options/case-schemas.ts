import type { LeastSquaresProblem } from "../../src/numeric/index.js";
import type { CaseOptions } from "../functions/case.js";
import { seed } from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import { func, numbers, oneOf, optional, required, type Schema, text, whole } from "./option.js";

const caseOptions: Schema<CaseOptions> = {
  title: required(text("Algae line 3", "a text"), "Title of the case"),
  question: required(text("When can it be drawn down?", "a text"), "The question, in the client's words"),
  domain: required(
    oneOf("debts", "cultures", "stock", "harvest"),
    "Field of the case, which decides the caution that is printed",
  ),
  seed: optional(seed, "Seed of every random number in the notebook, a whole number; it is shown", 1),
  date: optional(text("2026-04-01"), "Date of the case, printed as given"),
};

const openCaseSchema: FunctionSchema = {
  name: "openCase",
  takes: [],
  options: { fields: caseOptions },
  example: 'openCase({ title: "Line 3", question: "When is it full?", domain: "cultures" })',
};

const sentence = { name: "sentence", takes: text("Draw down at hour 138.") } as const;

const answerSchema: FunctionSchema = {
  name: "answer",
  takes: [sentence],
  example: 'answer("Draw down at hour 138.")',
};

const closeCaseSchema: FunctionSchema = { name: "closeCase", takes: [], example: "closeCase()" };

const explainSchema: FunctionSchema = {
  name: "explain",
  takes: [{ name: "word", takes: text("fill rate", "a word of the trade") }],
  example: 'explain("fill rate")',
};

const showSchema: FunctionSchema = {
  name: "show",
  takes: [{ name: "value", takes: ["anything"] }],
  example: "show(fit)",
};

const label = { name: "label", takes: text("Refits") } as const;
const total = { name: "total", takes: whole(0, 200), mayBeLeftOut: true } as const;

const progressSchema: FunctionSchema = {
  name: "progress",
  takes: [label, total],
  example: 'progress("Refits", 200)',
};

const withProgressSchema: FunctionSchema = {
  name: "withProgress",
  takes: [label, total, { name: "work", takes: func<unknown>("({ advance }) => advance()") }],
  example: 'withProgress("Refits", 200, ({ advance }) => advance())',
};

type Residuals = LeastSquaresProblem["residuals"];

const leastSquaresProblem: Schema<LeastSquaresProblem> = {
  residuals: required(
    func<Residuals>("([a]) => y.map((value) => value - a)"),
    "Residuals [rows] at parameters [size]; NaN where the model is not defined",
  ),
  jacobian: optional(
    func<Residuals>("() => y.map(() => -1)"),
    "Derivative of every residual by every parameter, row-major [rows, size]",
    "central differences",
  ),
  start: required(numbers("[1]", 1), "Values of the parameters where the search begins"),
  lower: optional(
    numbers("[0]"),
    "Lowest admitted values; a parameter with equal limits is held there",
    "no limit",
  ),
  upper: optional(
    numbers("[10]"),
    "Highest admitted values; a parameter with equal limits is held there",
    "no limit",
  ),
  scale: optional(
    numbers("[1]"),
    "Typical size of each parameter, for difference steps about 0",
    "its own value",
  ),
};

const leastSquaresSchema: FunctionSchema = {
  name: "leastSquares",
  takes: [],
  options: { fields: leastSquaresProblem },
  example: "leastSquares({ residuals: ([a]) => [a - 1, a - 2], start: [0] })",
};

export const caseSchemas: readonly FunctionSchema[] = [
  openCaseSchema,
  answerSchema,
  closeCaseSchema,
  explainSchema,
  showSchema,
  progressSchema,
  withProgressSchema,
  leastSquaresSchema,
];
