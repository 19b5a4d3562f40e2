import { encloseStep, type Interval, type StepEnclosure } from "../../rule/index.js";
import { enclosedRoots } from "../rest/enclosed-roots.js";
import type { HeldStep } from "../setting/held-step.js";

const product = (a: Interval, b: Interval): Interval => {
  const all = [a[0] * b[0], a[0] * b[1], a[1] * b[0], a[1] * b[1]].map((value) =>
    Number.isNaN(value) ? 0 : value,
  );
  const room = 8 * Number.EPSILON;
  const [low, high] = [Math.min(...all), Math.max(...all)];
  return [low - Math.abs(low) * room, high + Math.abs(high) * room];
};

/** Bounds on several steps in a row and on their slope. */
function encloseSteps(one: (x: Interval) => StepEnclosure, count: number): (x: Interval) => StepEnclosure {
  return (x) => {
    let value = x;
    let slope: Interval = [1, 1];
    for (let k = 0; k < count; k++) {
      const step = one(value);
      slope = product(slope, step.slope);
      value = step.value;
    }
    return { value, slope };
  };
}

/** Newton on all points of a cycle at once, which keeps its place where the slope of many steps is steep. */
export function polishCycle(held: HeldStep, start: readonly number[]): readonly number[] {
  const state = new Float64Array(1);
  let points = [...start];
  for (let round = 0; round < 8; round++) {
    const steps = points.map((x) => {
      state[0] = x;
      const { next, matrix } = held.slopes(state);
      return { next: next[0]!, slope: matrix[0]! };
    });
    // move[i+1] = slope[i] move[i] + gap[i], closed after the last point: one linear equation for move[0].
    let [slope, gap] = [1, 0];
    steps.forEach(({ next, slope: own }, i) => {
      gap = own * gap + next - points[(i + 1) % points.length]!;
      slope *= own;
    });
    if (slope === 1) return points;
    let move = gap / (1 - slope);
    const moves = steps.map(({ next, slope: own }, i) => {
      const current = move;
      move = own * move + next - points[(i + 1) % points.length]!;
      return current;
    });
    const largest = Math.max(...moves.map(Math.abs));
    if (!Number.isFinite(largest)) return points;
    points = points.map((x, i) => x + moves[i]!);
    if (largest <= 2 * Number.EPSILON * Math.max(...points.map(Math.abs))) break;
  }
  return points;
}

/** A cycle at one value of a parameter, with the product of its slopes. */
export interface Followed {
  readonly points: readonly number[];
  readonly slope: number;
}

/** Product of the slopes along a cycle, and the largest gap between a step from one point and the next point. */
export function slopeAlong(
  held: HeldStep,
  points: readonly number[],
): { readonly slope: number; readonly residual: number } {
  const state = new Float64Array(1);
  let [slope, residual] = [1, 0];
  points.forEach((x, i) => {
    state[0] = x;
    const { next, matrix } = held.slopes(state);
    slope *= matrix[0]!;
    residual = Math.max(residual, Math.abs(next[0]! - points[(i + 1) % points.length]!));
  });
  return { slope, residual };
}

/** The points that a start visits in `period` steps. */
export function orbit(held: HeldStep, start: number, period: number): readonly number[] {
  const state = Float64Array.of(start);
  return Array.from({ length: period }, () => {
    const x = state[0]!;
    held.step(state, state);
    return x;
  });
}

const near = (a: number, b: number): boolean =>
  Math.abs(a - b) <= 1e-7 * Math.max(Math.abs(a), Math.abs(b), 1e-9);

/** Whether some shorter period brings the points back. */
const repeats = (points: readonly number[]): boolean =>
  points.some(
    (_, k) =>
      k > 0 && points.length % k === 0 && points.every((x, i) => near(x, points[(i + k) % points.length]!)),
  );

/** Every cycle of a rule of one state with exactly that period in a range, each as its points from the lowest on. */
export function cyclesOfOneState(
  held: HeldStep,
  period: number,
  within: Interval,
): { readonly cycles: readonly (readonly number[])[]; readonly complete: boolean } {
  const enclosure = encloseSteps(encloseStep(held.rule, held), period);
  const after = (x: number): number => {
    const state = Float64Array.of(x);
    for (let k = 0; k < period; k++) held.step(state, state);
    return state[0]!;
  };
  const { roots, complete } = enclosedRoots({
    of: (x) => after(x) - x,
    enclose: (x) => {
      const { value, slope } = enclosure(x);
      return { value: [value[0] - x[1], value[1] - x[0]], slope: [slope[0] - 1, slope[1] - 1] };
    },
    within,
  });
  const cycles: (readonly number[])[] = [];
  for (const root of roots) {
    const points = polishCycle(held, orbit(held, root, period));
    const known = cycles.some((cycle) => cycle.some((x) => near(x, points[0]!)));
    if (known || repeats(points)) continue;
    const lowest = points.indexOf(Math.min(...points));
    cycles.push([...points.slice(lowest), ...points.slice(0, lowest)]);
  }
  return { cycles, complete };
}
