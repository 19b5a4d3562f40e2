import { type Limited, type LocalModel, localModel, type Step } from "./local-model.js";
import type { StopReason } from "./stop-reason.js";

/** Where a search for the lowest value of a function ended. */
export interface LowestValue {
  readonly estimates: Float64Array;
  readonly value: number;
  readonly stop: StopReason;
  readonly evaluations: number;
}

/** Bounds, and when to stop. */
export interface MinimiseFunctionOptions {
  /** Lowest and highest admitted values; an argument with equal bounds is held there. */
  readonly lower?: Float64Array;
  readonly upper?: Float64Array;
  /** Stops when a step is expected to lower the function by less than this; in the function's unit. Default 1e-11. */
  readonly tolerance?: number;
  /** Default 200. */
  readonly iterationLimit?: number;
  /** Typical size of each argument, below which difference steps do not shrink much further; default 1. */
  readonly scale?: Float64Array;
  /** Inverse of the second derivatives near the optimum, [size, size], where it is known: saves most of the search. */
  readonly inverse?: Float64Array;
}

/**
 * Minimises a smooth function of a few arguments: the BFGS method with central differences relative to the
 * arguments, a backtracking line search, and arguments at a bound held as long as the function falls outwards. Values
 * that are not finite count as too high.
 *
 * @see Nocedal and Wright (2006), Numerical Optimization, 2nd ed., algorithm 6.1; the initial scaling is by the
 *   function's own curvature along each argument.
 * @example minimise((x) => (x[0]! - 2) ** 2, Float64Array.of(0)).estimates[0]; // 2
 */
export function minimise(
  of: (at: Float64Array) => number,
  start: Float64Array,
  options: MinimiseFunctionOptions = {},
): LowestValue {
  const size = start.length;
  const { tolerance = 1e-11, iterationLimit = 200 } = options;
  const lower = options.lower ?? new Float64Array(size).fill(Number.NEGATIVE_INFINITY);
  const upper = options.upper ?? new Float64Array(size).fill(Number.POSITIVE_INFINITY);
  let evaluations = 0;
  const limited: Limited = {
    lower,
    upper,
    scale: options.scale ?? new Float64Array(size).fill(1),
    of(at) {
      evaluations++;
      const value = of(at);
      return Number.isNaN(value) ? Number.POSITIVE_INFINITY : value;
    },
  };
  const at = start.map((value, i) => Math.min(Math.max(value, lower[i]!), upper[i]!));
  const value = limited.of(at);
  const found = Number.isFinite(value)
    ? descend(limited, localModel(limited, at, value, options.inverse), at, value, tolerance, iterationLimit)
    : { value, stop: { kind: "failed", reason: "the function is not finite at the start" } as const };
  return { estimates: at, ...found, evaluations };
}

function descend(
  limited: Limited,
  local: LocalModel,
  at: Float64Array,
  start: number,
  tolerance: number,
  iterationLimit: number,
): { readonly value: number; readonly stop: StopReason } {
  let value = start;
  for (let iteration = 0; iteration < iterationLimit; iteration++) {
    const step = local.step();
    if (step.expected <= tolerance) return { value, stop: { kind: "converged", test: "gradient" } };
    const taken = backtrack(limited, at, value, step);
    if (taken !== undefined) {
      at.set(taken.at);
      value = taken.value;
      local.update(value);
    } else if (local.isFresh()) return { value, stop: { kind: "converged", test: "reduction" } };
    else local.restart(value);
  }
  return { value, stop: { kind: "iteration-limit" } };
}

/** The first point on the way along the step, halved again and again, at which the function is low enough. */
function backtrack(
  { of, lower, upper }: Limited,
  at: Float64Array,
  value: number,
  { direction, expected }: Step,
): { readonly at: Float64Array; readonly value: number } | undefined {
  for (let share = 1; share > 1e-10; share *= 0.4) {
    const next = at.map((here, i) => Math.min(Math.max(here + share * direction[i]!, lower[i]!), upper[i]!));
    const found = of(next);
    if (found < value - 2e-4 * share * expected) return { at: next, value: found };
  }
  return undefined;
}
