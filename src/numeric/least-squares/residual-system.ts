import { jacobianOfOtherShape, residualsOfOtherLength } from "../refusals.js";
import { differenceStep, relativeStep } from "./difference-step.js";
import { extrapolatedSlope } from "./extrapolated-slope.js";
import { centralSlope, type DifferenceProblem, oneSidedSlope } from "./finite-difference.js";
import type { LinearisedSystem } from "./linearised-system.js";
import { triangularise } from "./triangularise.js";

/** Residuals as functions of the parameters, with what is known about their derivatives. */
export interface ResidualProblem {
  readonly residuals: (parameters: Float64Array) => ArrayLike<number>;
  readonly jacobian: ((parameters: Float64Array) => ArrayLike<number>) | undefined;
  readonly rows: number;
  readonly lower: Float64Array;
  readonly upper: Float64Array;
  /** Typical size of each parameter; 0 where only its value tells. */
  readonly scale: Float64Array;
}

/** A least-squares system over residual functions, with derivatives by differences where none are given. */
export interface ResidualSystem extends LinearisedSystem {
  /** Residuals at the point evaluated last. */
  readonly residuals: Float64Array;
  /** Chooses the difference steps anew at a point; `fine` extrapolates the differences from then on. */
  readonly chooseSteps: (parameters: Float64Array, fine: boolean) => void;
  readonly evaluations: () => number;
}

/** How much wider the extrapolation begins than the step of a plain difference. */
const widening = 2048;

/** Makes the system. The Jacobian is triangularised by reflections, so its condition is never squared. */
export function residualSystem(problem: ResidualProblem): ResidualSystem {
  const { rows, scale } = problem;
  const size = scale.length;
  const residuals = new Float64Array(rows);
  const carried = new Float64Array(rows);
  const columns = Array.from({ length: size }, () => new Float64Array(rows));
  const triangle = new Float64Array(size * size);
  const projected = new Float64Array(size);
  const shares = new Float64Array(size).fill(relativeStep);
  const least = new Float64Array(size);
  let evaluations = 0;
  let extrapolates = false;

  const sample = (parameters: Float64Array, into: Float64Array): boolean => {
    evaluations++;
    const values = problem.residuals(parameters.slice());
    if (values.length !== rows) throw residualsOfOtherLength(rows, values.length);
    into.set(values);
    return into.every(Number.isFinite);
  };
  const differences: DifferenceProblem = { sample, rows, lower: problem.lower, upper: problem.upper };

  /** Equal bounds hold a parameter: what it would do is not asked. */
  const isHeld = (j: number): boolean => problem.lower[j] === problem.upper[j];

  const difference = (parameters: Float64Array, j: number, column: Float64Array): boolean => {
    const step = Math.max(shares[j]! * Math.abs(parameters[j]!), least[j]!);
    return (
      (extrapolates && extrapolatedSlope(differences, parameters, j, widening * step, column)) ||
      centralSlope(differences, parameters, j, step, column) ||
      oneSidedSlope(differences, parameters, j, step, column)
    );
  };
  return {
    size,
    triangle,
    projected,
    residuals,
    evaluations: () => evaluations,
    evaluate(parameters) {
      if (!sample(parameters, residuals)) return Number.POSITIVE_INFINITY;
      return residuals.reduce((sum, residual) => sum + residual * residual, 0);
    },
    linearise(parameters) {
      if (problem.jacobian !== undefined) copyColumns(problem.jacobian(parameters.slice()), columns, rows);
      else if (!columns.every((column, j) => isHeld(j) || difference(parameters, j, column))) return false;
      for (let j = 0; j < size; j++) if (isHeld(j)) columns[j]!.fill(0);
      carried.set(residuals);
      return triangularise(columns, carried, triangle, projected);
    },
    chooseSteps(parameters, fine) {
      if (problem.jacobian !== undefined) return;
      extrapolates = fine;
      for (let j = 0; j < size; j++) {
        const typical = Math.max(Math.abs(parameters[j]!), scale[j]!);
        const step = differenceStep(differences, parameters, j, typical);
        shares[j] = typical > 0 ? step / typical : relativeStep;
        // A parameter on its way through 0 keeps a step that can still be seen.
        least[j] = scale[j]! > 0 || typical === 0 ? step : 1e-4 * step;
      }
    },
  };
}

function copyColumns(jacobian: ArrayLike<number>, columns: readonly Float64Array[], rows: number): void {
  const size = columns.length;
  if (jacobian.length !== rows * size) throw jacobianOfOtherShape(rows, size, jacobian.length);
  for (let j = 0; j < size; j++) {
    for (let i = 0; i < rows; i++) columns[j]![i] = jacobian[i * size + j]!;
  }
}
