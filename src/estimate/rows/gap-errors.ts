import { choleskyFactor } from "../../numeric/index.js";
import type { CompiledRule, Rule } from "../../rule/index.js";
import { slotsOf } from "../unknowns/slots.js";

/** Values that are reached from one row: how many steps away, and of which state. */
export interface ReachedCell {
  readonly span: number;
  readonly state: number;
}

/** Covariance [cells, cells] of the errors of values reached from a state vector, in units of the variance of a step. */
export type GapCovariance = (
  parameters: Float64Array,
  inputs: readonly Float64Array[],
  start: Float64Array,
  period: number,
  cells: readonly ReachedCell[],
) => Float64Array;

/** Beyond this a value over a gap tells nothing: steps that spread errors so much have forgotten where they began. */
const most = 1e12;

/**
 * Errors over several steps: every step on the way adds one, which the slopes of the later steps carry on, so that the
 * variance is the sum of squared products of slopes, and two values share the errors of the steps before both. With
 * slopes of 1, as of a geometric rule between logarithms, the variance is the number of steps.
 *
 * @param log - whether errors are added to logarithms.
 */
export function gapCovariance(rule: Rule, compiled: CompiledRule, log: boolean): GapCovariance {
  const slots = slotsOf(rule).length;
  const states = rule.states.length;
  const first = rule.parameters.length;
  const width = first + slots;
  const path = new Float64Array(2 * slots);
  const sensitivities = new Float64Array(2 * slots * width);
  const reached: Float64Array[] = [];
  const slopes: Float64Array[] = [];
  /** How a value follows the error of every state in every step before it, [steps, states]. */
  const follows = ({ span, state }: ReachedCell): Float64Array => {
    const all = new Float64Array(span * states);
    const end = reached[span]![state]!;
    let along: Float64Array = reached[span]!.map((_, a) => (a === state ? 1 : 0));
    for (let k = span; k > 0; k--) {
      for (let a = 0; a < states; a++)
        all[(k - 1) * states + a] = along[a]! * (log ? reached[k]![a]! / end : 1);
      along = through(along, slopes[k]!);
    }
    return all;
  };
  return (parameters, inputs, start, period, cells) => {
    reached[0] = start;
    const longest = cells.reduce((far, { span }) => Math.max(far, span), 0);
    for (let k = 1; k <= longest; k++) {
      const from = period + k - 1;
      compiled.pathWithSensitivities(reached[k - 1]!, parameters, inputs, from, 1, path, sensitivities);
      reached[k] = path.slice(slots);
      slopes[k] = Float64Array.from({ length: slots * slots }, (_, e) => {
        const [row, column] = [Math.floor(e / slots), e % slots];
        return sensitivities[(slots + row) * width + first + column]!;
      });
    }
    const all = cells.map(follows);
    return Float64Array.from({ length: cells.length ** 2 }, (_, e) => {
      const [one, other] = [all[Math.floor(e / cells.length)]!, all[e % cells.length]!];
      return one.reduce((sum, value, k) => sum + value * (other[k] ?? 0), 0);
    });
  };
}

/** A row vector times a square matrix. */
function through(row: Float64Array, matrix: Float64Array): Float64Array {
  const size = row.length;
  return row.map((_, b) => row.reduce((sum, value, a) => sum + value * matrix[a * size + b]!, 0));
}

/** What one of several values reached from one row adds to those before it. */
export interface Conditional {
  /** Standard deviation of its error once the errors before it are known, in units of that of a step. */
  readonly deviation: number;
  /** By value before it: by how much of its error this one is expected to be off. */
  readonly shares: Float64Array;
}

/** Each value's error given those of the values before it; a value that tells nothing is taken by itself. */
export function conditionals(covariance: Float64Array, size: number): readonly Conditional[] {
  const factor = choleskyFactor(covariance, size);
  const usable = factor?.every((entry) => Math.abs(entry) < Math.sqrt(most)) ?? false;
  return Array.from({ length: size }, (_, i) => {
    if (!usable) {
      const variance = covariance[i * size + i]!;
      return {
        deviation: Math.sqrt(Number.isFinite(variance) ? Math.min(variance, most) : most),
        shares: new Float64Array(i),
      };
    }
    return { deviation: factor![i * size + i]!, shares: sharesOf(factor!, size, i) };
  });
}

/** Row i of the factor L times the inverse of the part of L above it. */
function sharesOf(factor: Float64Array, size: number, i: number): Float64Array {
  const shares = factor.slice(i * size, i * size + i);
  for (let j = i - 1; j >= 0; j--) {
    for (let k = j + 1; k < i; k++) shares[j] = shares[j]! - shares[k]! * factor[k * size + j]!;
    shares[j] = shares[j]! / factor[j * size + j]!;
  }
  return shares;
}
