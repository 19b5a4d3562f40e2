import { describe, expect, test } from "vitest";
import { differenceStep } from "../../src/numeric/least-squares/difference-step.js";
import { extrapolatedSlope } from "../../src/numeric/least-squares/extrapolated-slope.js";
import {
  centralSlope,
  type DifferenceProblem,
  disagreement,
  oneSidedSlope,
} from "../../src/numeric/least-squares/finite-difference.js";

/** The functions as rows of a problem in one parameter, open to both sides unless bounds are given. */
function problem(
  functions: readonly ((x: number) => number)[],
  lower = Number.NEGATIVE_INFINITY,
  upper = Number.POSITIVE_INFINITY,
): DifferenceProblem {
  return {
    rows: functions.length,
    lower: Float64Array.of(lower),
    upper: Float64Array.of(upper),
    sample(parameters, into) {
      functions.forEach((of, i) => {
        into[i] = of(parameters[0]!);
      });
      return into.every(Number.isFinite);
    },
  };
}

const square = (x: number): number => x * x;
const cube = (x: number): number => x ** 3;

describe("a central difference", () => {
  // By hand: exact for a parabola; for a cube the slope is 3 x^2 + h^2.
  test("has the error of second order that the formula has", () => {
    const at = Float64Array.of(2);
    const column = new Float64Array(2);
    expect(centralSlope(problem([square, cube]), at, 0, 0.5, column)).toBe(true);
    expect([...column]).toEqual([4, 12.25]);
    expect(at[0]).toBe(2);
  });

  test.each<[string, DifferenceProblem, number]>([
    ["beyond the upper bound", problem([square], -9, 2.25), 0.5],
    ["beyond the lower bound", problem([square], 1.75), 0.5],
    ["where the function does not exist above", problem([(x) => (x > 2.25 ? Number.NaN : x)]), 0.5],
    ["where the function does not exist below", problem([(x) => (x < 1.75 ? Number.NaN : x)]), 0.5],
    ["over a step that rounding swallows", problem([square]), 1e-17],
  ])("is not taken %s", (_, given, step) => {
    const at = Float64Array.of(2);
    expect(centralSlope(given, at, 0, step, new Float64Array(1))).toBe(false);
    expect(at[0]).toBe(2);
  });

  test("may reach the bounds themselves", () => {
    expect(centralSlope(problem([square], 1.5, 2.5), Float64Array.of(2), 0, 0.5, new Float64Array(1))).toBe(
      true,
    );
  });
});

describe("a one-sided difference", () => {
  // By hand: exact for a parabola; for a cube the slope is 3 x^2 - 2 h^2, above and below alike.
  test.each([
    ["above", problem([square, cube], 2)],
    ["below", problem([square, cube], -9, 2)],
    [
      "below where the function does not exist above",
      problem([square, (x) => (x > 2 ? Number.NaN : cube(x))]),
    ],
    [
      "below where the function does not exist far above",
      problem([square, (x) => (x > 2.5 ? Number.NaN : cube(x))]),
    ],
  ])("is taken from the side %s", (_, given) => {
    const at = Float64Array.of(2);
    const column = new Float64Array(2);
    expect(oneSidedSlope(given, at, 0, 0.5, column)).toBe(true);
    expect([...column]).toEqual([4, 11.5]);
    expect(at[0]).toBe(2);
  });

  test("is not taken between bounds that leave no room, or over nothing", () => {
    const column = new Float64Array(1);
    expect(oneSidedSlope(problem([square], 1.5, 2.5), Float64Array.of(2), 0, 0.5, column)).toBe(false);
    expect(oneSidedSlope(problem([square], 1, 3), Float64Array.of(2), 0, 0.5, column)).toBe(true);
    expect(oneSidedSlope(problem([square]), Float64Array.of(2), 0, 1e-17, column)).toBe(false);
    expect(oneSidedSlope(problem([() => Number.NaN]), Float64Array.of(2), 0, 0.5, column)).toBe(false);
  });
});

// By hand: |(3, 4) - (0, 0)| against the root of the mean of 25 and 0; equal columns; two empty ones.
test("the disagreement of two columns is relative, and 0 where both vanish", () => {
  const [a, none] = [Float64Array.of(3, 4), new Float64Array(2)];
  expect(disagreement(a, none)).toBeCloseTo(Math.SQRT2, 15);
  expect(disagreement(a, a)).toBe(0);
  expect(disagreement(none, none)).toBe(0);
  expect(disagreement(Float64Array.of(1, 1), Float64Array.of(1, 1 + 1e-6))).toBeCloseTo(
    1e-6 / Math.SQRT2,
    12,
  );
});

describe("extrapolated differences", () => {
  // Closed forms of the derivatives at 1: cos 1, e, -1.
  test("have nearly all digits from wide steps", () => {
    const column = new Float64Array(3);
    const given = problem([Math.sin, Math.exp, (x) => 1 / x]);
    expect(extrapolatedSlope(given, Float64Array.of(1), 0, 0.1, column)).toBe(true);
    [Math.cos(1), Math.E, -1].forEach((slope, i) => {
      expect(Math.abs(column[i]! / slope - 1)).toBeLessThan(2e-12);
    });
  });

  test("begin where the function exists", () => {
    const column = new Float64Array(1);
    expect(extrapolatedSlope(problem([Math.sqrt], 0.9), Float64Array.of(1), 0, 0.5, column)).toBe(true);
    expect(Math.abs(column[0]! / 0.5 - 1)).toBeLessThan(1e-10);
    expect(extrapolatedSlope(problem([Math.sqrt], 1), Float64Array.of(1), 0, 0.5, column)).toBe(false);
  });

  test("stop early, before rounding spoils them", () => {
    let calls = 0;
    const counted = problem([
      (x) => {
        calls++;
        return Math.exp(x);
      },
    ]);
    expect(extrapolatedSlope(counted, Float64Array.of(1), 0, 0.1, new Float64Array(1))).toBe(true);
    expect(calls).toBeLessThan(22);
  });
});

describe("the step of a difference", () => {
  const root = Math.cbrt(Number.EPSILON);

  test("is relative to the size where the function is smooth there", () => {
    expect(differenceStep(problem([Math.exp]), Float64Array.of(2), 0, 2)).toBe(2 * root);
  });

  // The wave has a length of 1e-6, much shorter than the plain step of 6e-6.
  test("is smaller where the function turns within it", () => {
    const wave = (x: number): number => Math.sin((x * 2 * Math.PI) / 1e-6);
    const step = differenceStep(problem([wave]), Float64Array.of(1), 0, 1);
    expect(step).toBeLessThan(1.1e-2 * root);
    expect(step).toBeGreaterThan(0.9e-4 * root);
  });

  test.each([1e-9, 1, 1e9])("is found at 0 for a parameter whose size is %f but not told", (size) => {
    const at = Float64Array.of(0);
    const given = problem([(x) => Math.exp(x / size)]);
    const step = differenceStep(given, at, 0, 0);
    const column = new Float64Array(1);
    centralSlope(given, at, 0, step, column);
    expect(Math.abs(column[0]! * size - 1)).toBeLessThan(1e-7);
  });

  test("is not taken from steps to which the function does not answer", () => {
    // A step below 1e-4 leaves the value as it is.
    const stairs = (x: number): number => Math.round(x * 1e4) / 1e4;
    expect(differenceStep(problem([stairs]), Float64Array.of(0), 0, 0)).toBeGreaterThan(1e-4);
    expect(differenceStep(problem([() => 3]), Float64Array.of(5), 0, 5)).toBe(5 * root);
    expect(differenceStep(problem([() => 3]), Float64Array.of(0), 0, 0)).toBe(root);
  });
});
