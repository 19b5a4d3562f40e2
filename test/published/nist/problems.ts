import { readFileSync } from "node:fs";
import { join } from "node:path";
import { models } from "./models.js";

/** A problem of the collection, as the fixture holds it. */
export interface Problem {
  readonly problem: string;
  readonly starts: readonly (readonly number[])[];
  readonly estimates: readonly number[];
  readonly standardDeviations: readonly number[];
  readonly sumOfSquares: number;
  readonly responses: readonly number[];
  readonly predictors: readonly (readonly number[])[];
}

const file = join(__dirname, "../fixtures/nist/nonlinear-regression.json");
export const problems: readonly Problem[] = JSON.parse(readFileSync(file, "utf8"));

/** Residuals of a problem at parameters b, in units of 1/`scale` of the data's. */
export function residualsOf(problem: Problem, scale = 1): (b: ArrayLike<number>) => number[] {
  const model = models[problem.problem]!;
  const response = problem.problem === "Nelson" ? Math.log : (y: number) => y;
  return (b) => problem.responses.map((y, i) => scale * (response(y) - model(b, problem.predictors[i]!)));
}
