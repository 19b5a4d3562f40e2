import { sweepHeld } from "../algebra/sweep-held.js";

const relativeStep = Math.cbrt(Number.EPSILON);

/** A function, and where its arguments must stay. */
export interface Limited {
  readonly of: (at: Float64Array) => number;
  readonly lower: Float64Array;
  readonly upper: Float64Array;
  readonly scale: Float64Array;
}

export interface Step {
  readonly direction: Float64Array;
  /** Half the slope along the direction: by how much the model says that the function falls. */
  readonly expected: number;
}

export interface LocalModel {
  readonly step: () => Step;
  readonly update: (value: number) => void;
  readonly restart: (value: number) => void;
  /** Whether the curvature was taken at the present point, so that starting again would change nothing. */
  readonly isFresh: () => boolean;
}

/** Gradient and approximate inverse of the second derivatives at the present point, which `at` always holds. */
export function localModel(
  limited: Limited,
  at: Float64Array,
  value: number,
  known: Float64Array | undefined,
): LocalModel {
  const { lower, upper } = limited;
  const size = at.length;
  const gradient = new Float64Array(size);
  const inverse = new Float64Array(size * size);
  const before = at.slice();
  const gradientBefore = new Float64Array(size);
  let fresh = false;
  const fixed = (i: number): boolean => lower[i] === upper[i];
  const held = (i: number): boolean =>
    fixed(i) || (at[i]! <= lower[i]! && gradient[i]! > 0) || (at[i]! >= upper[i]! && gradient[i]! < 0);
  const takeGradient = (here: number): void => {
    for (let i = 0; i < size; i++)
      if (!fixed(i)) gradient[i] = slopeAndBend(limited, at, here, i, relativeStep).slope;
  };
  const restart = (here: number): void => {
    takeGradient(here);
    inverse.fill(0);
    for (let i = 0; i < size; i++) {
      if (fixed(i)) continue;
      const { bend } = slopeAndBend(limited, at, here, i, Math.sqrt(relativeStep));
      inverse[i * size + i] =
        bend > 0 ? 1 / bend : (0.1 * (Math.abs(at[i]!) || limited.scale[i]!)) / (Math.abs(gradient[i]!) || 1);
    }
    remember();
    fresh = true;
  };
  const remember = (): void => {
    before.set(at);
    gradientBefore.set(gradient);
  };
  if (known?.every(Number.isFinite)) {
    inverse.set(known);
    takeGradient(value);
    remember();
  } else restart(value);
  return {
    isFresh: () => fresh,
    restart,
    step() {
      const stopped = Array.from(at, (_, i) => held(i));
      const free = sweepHeld(inverse, stopped);
      const direction = new Float64Array(size);
      for (let k = 0; k < free.length; k++) {
        const i = Math.floor(k / size);
        if (!stopped[i] && !stopped[k % size]) direction[i] = direction[i]! - free[k]! * gradient[k % size]!;
      }
      const slope = direction.reduce((sum, value, i) => sum + value * gradient[i]!, 0);
      return { direction, expected: -slope / 2 };
    },
    update(here) {
      takeGradient(here);
      // What an argument held at its bound does to the slopes says nothing about those that move.
      for (let i = 0; i < size; i++) if (at[i] === before[i] && held(i)) gradientBefore[i] = gradient[i]!;
      updateInverse(inverse, at, before, gradient, gradientBefore);
      remember();
      fresh = false;
    },
  };
}

/** First and second derivative by argument i, from one side where the other is barred. */
function slopeAndBend(
  { of, lower, upper, scale }: Limited,
  at: Float64Array,
  value: number,
  i: number,
  relative: number,
): { readonly slope: number; readonly bend: number } {
  const here = at[i]!;
  const step = relative * Math.max(Math.abs(here), 1e-3 * scale[i]!);
  at[i] = Math.min(here + step, upper[i]!);
  const up = at[i]! - here;
  const above = up > 0 ? of(at) : value;
  at[i] = Math.max(here - step, lower[i]!);
  const down = here - at[i]!;
  const below = down > 0 ? of(at) : value;
  at[i] = here;
  if (!Number.isFinite(above)) return { slope: down > 0 ? (value - below) / down : 0, bend: 0 };
  if (!Number.isFinite(below)) return { slope: (above - value) / up, bend: 0 };
  const bend = up > 0 && down > 0 ? (above - 2 * value + below) / (up * down) : 0;
  return { slope: (above - below) / (up + down), bend };
}

/** The BFGS update, left out where the curvature along the step is not positive. */
function updateInverse(
  inverse: Float64Array,
  point: Float64Array,
  before: Float64Array,
  gradient: Float64Array,
  gradientBefore: Float64Array,
): void {
  const size = point.length;
  const s = point.map((value, i) => value - before[i]!);
  const y = gradient.map((value, i) => value - gradientBefore[i]!);
  const along = s.reduce((sum, value, i) => sum + value * y[i]!, 0);
  const turned = s.map((_, i) => y.reduce((sum, value, j) => sum + inverse[i * size + j]! * value, 0));
  const bend = y.reduce((sum, value, i) => sum + value * turned[i]!, 0);
  if (!(along > 1e-12 * Math.sqrt(Math.abs(bend * along)))) return;
  const weight = (1 + bend / along) / along;
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      const change = weight * s[i]! * s[j]! - (turned[i]! * s[j]! + s[i]! * turned[j]!) / along;
      inverse[i * size + j] = inverse[i * size + j]! + change;
    }
  }
}
