import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { leastSquares, minimiseSquares, squaresWorkspace } from "../../src/numeric/index.js";
import { holdAtBounds } from "../../src/numeric/least-squares/bounded-step.js";
import { predictedReduction, slopeAlong } from "../../src/numeric/least-squares/linear-model.js";
import { trustRegionStep } from "../../src/numeric/least-squares/trust-region-step.js";

const periods = Array.from({ length: 12 }, (_, t) => t);
const readings = [10.1, 13.4, 18.9, 24.3, 32.2, 40.5, 50.1, 58.2, 67.9, 74.8, 81.2, 86.3];

function growth([capacity, middle, width]: ArrayLike<number> & Iterable<number>, t: number): number {
  return capacity! / (1 + Math.exp((middle! - t) / width!));
}
const residuals = (parameters: Float64Array): number[] =>
  readings.map((reading, t) => reading - growth(parameters, t));
const start = [80, 5, 3];

function close(a: ArrayLike<number | undefined>, b: ArrayLike<number | undefined>, tolerance: number): void {
  expect(a.length).toBe(b.length);
  for (let i = 0; i < a.length; i++) expect(Math.abs(a[i]! / b[i]! - 1)).toBeLessThan(tolerance);
}

describe("leastSquares", () => {
  const plain = leastSquares({ residuals, start });

  test("solves a straight line as the normal equations do", () => {
    // Closed form: slope = Sxy/Sxx, its standard error s/sqrt(Sxx).
    const y = [2.1, 3.9, 6.2, 7.8, 10.1];
    const x = [1, 2, 3, 4, 5];
    const line = leastSquares({ residuals: ([a, b]) => y.map((v, i) => v - a! - b! * x[i]!), start: [0, 0] });
    const middle = y.reduce((sum, v) => sum + v, 0) / 5;
    const slope = x.reduce((sum, v, i) => sum + (v - 3) * (y[i]! - middle), 0) / 10;
    const left = y.reduce((sum, v, i) => sum + (v - middle - slope * (x[i]! - 3)) ** 2, 0);
    close(line.estimates, [middle - 3 * slope, slope], 1e-11);
    close([line.sumOfSquares, line.standardErrors[1]], [left, Math.sqrt(left / 3 / 10)], 1e-11);
  });

  test("gives the same with an exact Jacobian", () => {
    const jacobian = ([capacity, middle, width]: Float64Array): number[] =>
      periods.flatMap((t) => {
        const e = Math.exp((middle! - t) / width!);
        const bend = (capacity! * e) / (1 + e) ** 2 / width!;
        return [-1 / (1 + e), bend, (-bend * (middle! - t)) / width!];
      });
    const exact = leastSquares({ residuals, jacobian, start });
    close(exact.estimates, plain.estimates, 1e-10);
    close(exact.standardErrors, plain.standardErrors, 1e-9);
  });

  test("does not depend on the units of responses and parameters", () => {
    const powers = fc.integer({ min: -9, max: 9 }).map((power) => 10 ** power);
    fc.assert(
      fc.property(powers, powers, powers, (ofReadings, ofTime, ofStart) => {
        const scaled = leastSquares({
          residuals: ([a, b, c]) =>
            residuals(Float64Array.of(a! / ofStart, b! / ofTime, c! / ofTime)).map((r) => r * ofReadings),
          start: [start[0]! * ofStart, start[1]! * ofTime, start[2]! * ofTime],
        });
        const back = [
          scaled.estimates[0]! / ofStart,
          scaled.estimates[1]! / ofTime,
          scaled.estimates[2]! / ofTime,
        ];
        close(back, plain.estimates, 1e-9);
      }),
      { seed: 1, numRuns: 30 },
    );
  });

  test("does not depend on the order of the rows or of the parameters", () => {
    const rows = fc.shuffledSubarray(periods, { minLength: periods.length });
    const places = fc.shuffledSubarray([0, 1, 2], { minLength: 3 });
    fc.assert(
      fc.property(rows, places, (order, place) => {
        const shuffled = leastSquares({
          residuals: (parameters) => {
            const named = Float64Array.from([0, 1, 2], (i) => parameters[place.indexOf(i)]!);
            const all = residuals(named);
            return order.map((row) => all[row]!);
          },
          start: place.map((i) => start[i]!),
        });
        close(
          shuffled.estimates,
          place.map((i) => plain.estimates[i]!),
          1e-9,
        );
        close(
          shuffled.standardErrors,
          place.map((i) => plain.standardErrors[i]),
          1e-8,
        );
      }),
      { seed: 2, numRuns: 20 },
    );
  });

  // Source: Newton's iteration of the same sum with mpmath 1.3.0, 40 digits, on the parameters that are not held;
  // tolerance from the solver's own, 1e-10 of the residuals.
  test("finds estimates, standard errors and covariances of a growth curve", () => {
    close(plain.estimates, [100.42127831253622, 6.056528303573934, 2.7303949015943996], 1e-9);
    close(plain.standardErrors, [0.8770291938167105, 0.061791900701840236, 0.034558015511389574], 1e-7);
    close(
      [plain.sumOfSquares, plain.variance, plain.covariance[1], plain.covariance[2], plain.covariance[5]],
      [
        1.267159328194864,
        1.267159328194864 / 9,
        0.05243700586981641,
        0.02665329495713493,
        0.0018295458365661912,
      ],
      1e-7,
    );
    expect(plain.rank).toBe(3);
    close(plain.residuals, residuals(plain.estimates), 1e-12);
  });

  const wide = [1e4, 100, 100];
  test.each<[string, object, number[], number[], number]>([
    [
      "an upper bound on the first",
      { upper: [90, ...wide.slice(1)] },
      start,
      [90, 5.345833157044989, 2.3506952546400157],
      31.893426270228684,
    ],
    [
      "an upper bound on the second",
      { upper: [1e4, 6, 100] },
      start,
      [99.64746424165045, 6, 2.70327863587062],
      1.3883773185585617,
    ],
    [
      "a lower bound on the third",
      { lower: [0, 0, 3] },
      start,
      [106.87866830285404, 6.500243555310973, 3],
      8.685202969633451,
    ],
    [
      "a start on the binding bound",
      { upper: [1e4, 6, 100] },
      [80, 6, 3],
      [99.64746424165045, 6, 2.70327863587062],
      1.3883773185585617,
    ],
    [
      "a start beyond the binding bound",
      { upper: [90, 100, 100] },
      [200, 5, 3],
      [90, 5.345833157044989, 2.3506952546400157],
      31.893426270228684,
    ],
    [
      "equal bounds",
      { lower: [90, 0, 0], upper: [90, 100, 100] },
      start,
      [90, 5.345833157044989, 2.3506952546400157],
      31.893426270228684,
    ],
  ])("settles on the bound that binds: %s", (_, bounds, from, estimates, sum) => {
    const found = leastSquares({ residuals, start: from, ...bounds });
    close(found.estimates, estimates, 1e-8);
    close([found.sumOfSquares], [sum], 1e-10);
    expect(found.stop.kind).toBe("converged");
  });

  // With the first held at 90 the other two are those of the problem in two parameters, standard errors too.
  test("gives a parameter that is held no standard error, and counts it for none", () => {
    const other = leastSquares({
      residuals: ([b, c]) => residuals(Float64Array.of(90, b!, c!)),
      start: [5, 3],
    });
    const jacobian = (at: Float64Array): number[] => {
      const [capacity, middle, width] = at;
      return periods.flatMap((t) => {
        const e = Math.exp((middle! - t) / width!);
        const part = (capacity! * e) / (1 + e) ** 2 / width!;
        return [-1 / (1 + e), part, (-part * (middle! - t)) / width!];
      });
    };
    const bounds = { lower: [90, 0, 0.1], upper: [90, 100, 100] };
    for (const held of [
      leastSquares({ residuals, start, ...bounds }),
      leastSquares({ residuals, jacobian, start, ...bounds }),
    ]) {
      expect(held.standardErrors[0]).toBeUndefined();
      close(held.standardErrors.slice(1), other.standardErrors, 1e-7);
      close([held.variance], [31.893426270228684 / 10], 1e-9);
      expect(held.rank).toBe(2);
    }
  });

  test.each<[string, object, number[]]>([
    ["a lower one", { lower: [0, 0, 0], upper: [1e4, 20, 20] }, [80, 0, 3]],
    ["an upper one", { lower: [0, 0, 0], upper: [1e4, 8, 20] }, [80, 8, 3]],
    ["several", { lower: [50, 1, 1], upper: [101, 12, 6] }, [101, 12, 1]],
  ])("leaves a bound again that binds only at the start: %s", (_, bounds, from) => {
    const found = leastSquares({ residuals, start: from, ...bounds });
    close(found.estimates, plain.estimates, 1e-8);
    expect(found.stop.kind).toBe("converged");
  });

  test("says which parameters are not determined, and makes no number up for them", () => {
    const product = leastSquares({
      residuals: ([a, b, c]) => readings.map((reading, t) => reading - a! * b! * t - c!),
      start: [1, 2, 3],
    });
    expect(product.rank).toBe(2);
    expect(product.standardErrors.map((error) => error !== undefined)).toEqual([false, false, true]);
    expect(Number.isNaN(product.covariance[0])).toBe(true);
  });

  test("gives no standard errors when no residual is left over", () => {
    const exact = leastSquares({ residuals: ([a, b]) => [a! - 1, b! - 2], start: [0, 0] });
    close(exact.estimates, [1, 2], 1e-12);
    expect(exact.standardErrors).toEqual([undefined, undefined]);
  });

  test("walks round places where the model is not defined", () => {
    const of = ([a]: Float64Array): number[] =>
      readings.map((reading, t) => reading - Math.sqrt(a! * t + 100));
    const found = leastSquares({ residuals: of, start: [5000] });
    expect(found.stop.kind).toBe("converged");
    // The slope of the sum is 0 there, by differences of the closed form.
    const sum = (a: number): number => of(Float64Array.of(a)).reduce((total, r) => total + r * r, 0);
    const a = found.estimates[0]!;
    expect(Math.abs(sum(a * 1.0001) - sum(a * 0.9999)) / sum(a)).toBeLessThan(1e-9);
  });

  test("reports a start at which the model is not finite, and derivatives that are not", () => {
    const broken = leastSquares({ residuals: ([a]) => [Math.log(a!), 1], start: [-1] });
    expect(broken.stop).toEqual({ kind: "failed", reason: "the model is not finite at the start" });
    const edge = leastSquares({
      residuals: ([a]) => [a! - 3, 1],
      jacobian: () => [Number.NaN, 0],
      start: [1],
    });
    expect(edge.stop).toEqual({
      kind: "failed",
      reason: "the derivatives are not finite where the search went",
    });
  });

  test("finds derivatives at 0 of a parameter whose size only its scale tells", () => {
    const of = ([a]: Float64Array): number[] =>
      [1, 2, 3].map((x, i) => Math.exp(a! * 1e9 * x) - [2, 4, 8][i]!);
    const found = leastSquares({ residuals: of, start: [0], scale: [1e-9] });
    close(found.estimates, [Math.LN2 * 1e-9], 1e-9);
    close(leastSquares({ residuals: of, start: [0] }).estimates, [Math.LN2 * 1e-9], 1e-9);
  });

  test("counts the calls of the residual function and freezes its result", () => {
    let calls = 0;
    const found = leastSquares({
      residuals: (at) => {
        calls++;
        return residuals(at);
      },
      start,
    });
    // One call finds the number of residuals.
    expect(found.evaluations).toBe(calls - 1);
    expect(found.kind).toBe("least-squares");
    expect(Object.isFrozen(found)).toBe(true);
  });

  test.each<[Parameters<typeof leastSquares>[0], string, string, object]>([
    [
      { residuals: () => [1], start: [1, 2] },
      "too-few-residuals",
      "1 residuals cannot determine 2 parameters. Give at least as many residuals as parameters, or hold some parameters fixed.",
      { rows: 1, size: 2 },
    ],
    [
      { residuals: () => [1, 2], start: [1, Number.NaN] },
      "bad-start",
      "Start value 2 is NaN. Give a finite number to start every parameter from.",
      { position: 1, value: Number.NaN },
    ],
    [
      { residuals: () => [1, 2], start: [1], lower: [2], upper: [1] },
      "bad-bounds",
      "Parameter 1 has the lower bound 2 and the upper bound 1. Give a lower bound that is not above the upper one.",
      { position: 0, lower: 2, upper: 1 },
    ],
    [
      { residuals: () => [1, 2], start: [1], lower: [2, 3] },
      "other-number-of-parameters",
      "The start has 1 parameters but lower has 2 entries. Give one entry a parameter, in the same order.",
      { what: "lower", expected: 1, found: 2 },
    ],
    [
      { residuals: () => [1, 2], start: [1], upper: [] },
      "other-number-of-parameters",
      "The start has 1 parameters but upper has 0 entries. Give one entry a parameter, in the same order.",
      { what: "upper", expected: 1, found: 0 },
    ],
    [
      { residuals: () => [1, 2], start: [1], scale: [1, 1] },
      "other-number-of-parameters",
      "The start has 1 parameters but scale has 2 entries. Give one entry a parameter, in the same order.",
      { what: "scale", expected: 1, found: 2 },
    ],
    [
      { residuals: () => [1, 2], start: [1], jacobian: () => [1] },
      "jacobian-of-other-shape",
      "The Jacobian has 1 entries, but 2 residuals by 1 parameters need 2. Give it row after row: the derivatives of the first residual by every parameter come first.",
      { rows: 2, size: 1, found: 1 },
    ],
    [
      { residuals: ([a]) => (a === 1 ? [1, 2] : [1]), start: [1] },
      "residuals-of-other-length",
      "The residual function gave 1 values after giving 2 at the start. Give one residual for every observation, at whatever parameters; where the model is not defined, give NaN.",
      { expected: 2, found: 1 },
    ],
  ])("refuses a problem that cannot be meant: %#", (problem, code, message, facts) => {
    expect(() => leastSquares(problem)).toThrow(
      expect.objectContaining({ name: "ModelError", code, message, facts }),
    );
  });
});

// By hand, on two residuals, c - 3 and 2c - 4: R = sqrt 5, R'z = 5c - 11, and the best c is 11/5 with the sum 4/5.
describe("minimiseSquares", () => {
  function line(onEvaluate: () => void = () => undefined) {
    const triangle = Float64Array.of(Math.sqrt(5));
    const projected = Float64Array.of(0);
    return {
      size: 1,
      triangle,
      projected,
      evaluate(at: Float64Array): number {
        onEvaluate();
        return (at[0]! - 3) ** 2 + (2 * at[0]! - 4) ** 2;
      },
      linearise(at: Float64Array): boolean {
        projected[0] = (5 * at[0]! - 11) / triangle[0]!;
        return true;
      },
    };
  }

  test("solves what is linear in a step, and does not change the start", () => {
    const from = Float64Array.of(0);
    const found = minimiseSquares(line(), from);
    close([found.estimates[0], found.sumOfSquares], [2.2, 0.8], 1e-12);
    expect(from[0]).toBe(0);
    expect(found.iterations).toBeLessThan(4);
    expect(found.stop).toEqual({ kind: "converged", test: "gradient" });
  });

  test("evaluates as often as it says, and stops at the limit of iterations", () => {
    let calls = 0;
    const found = minimiseSquares(
      line(() => calls++),
      Float64Array.of(0),
      { reach: 1e-3 },
    );
    expect(found.evaluations).toBe(calls);
    close([found.estimates[0]], [2.2], 1e-12);
    const stopped = minimiseSquares(line(), Float64Array.of(0), { reach: 1e-3, iterationLimit: 2 });
    expect(stopped.stop).toEqual({ kind: "iteration-limit" });
    expect(stopped.evaluations).toBe(3);
  });

  test("takes scales from the lengths of the columns, which never shrink", () => {
    const workspace = squaresWorkspace(1);
    minimiseSquares(line(), Float64Array.of(0), { workspace });
    expect(workspace.scale[0]).toBeCloseTo(Math.sqrt(5), 14);
    // One residual c^2 - 4 from 9: its slope 2c falls from 18 to 4.
    const triangle = Float64Array.of(18);
    const projected = Float64Array.of(77);
    const parabola = {
      size: 1,
      triangle,
      projected,
      evaluate: ([c]: Float64Array): number => (c! * c! - 4) ** 2,
      linearise([c]: Float64Array): boolean {
        triangle[0] = 2 * c!;
        projected[0] = c! * c! - 4;
        return true;
      },
    };
    close([minimiseSquares(parabola, Float64Array.of(9), { workspace }).estimates[0]], [2], 1e-12);
    expect(workspace.scale[0]).toBe(18);
  });

  // By hand: R'z = [2, 1 + 6]; the sum falls towards lower values of both, so a lower bound of theirs binds, no upper one.
  test("holds what sits on a bound with the sum falling outwards", () => {
    const workspace = squaresWorkspace(2);
    const [triangle, projected] = [Float64Array.of(2, 1, 0, 3), Float64Array.of(1, 2)];
    const at = Float64Array.of(5, 7);
    const open = { lower: Float64Array.of(-9, -9), upper: Float64Array.of(9, 9) };
    const held = (bounds: typeof open): number[] => {
      const count = holdAtBounds(workspace, triangle, projected, at, bounds);
      expect(count).toBe(2 - workspace.held.filter((each) => each === 1).length);
      return [...workspace.held];
    };
    expect(held(open)).toEqual([0, 0]);
    expect([...workspace.gradient]).toEqual([2, 7]);
    expect(held({ ...open, lower: Float64Array.of(-9, 7) })).toEqual([0, 1]);
    expect(held({ ...open, lower: Float64Array.of(5, -9) })).toEqual([1, 0]);
    expect(held({ ...open, upper: at })).toEqual([0, 0]);
    projected.set([-1, -2]);
    expect(held({ ...open, upper: Float64Array.of(9, 7) })).toEqual([0, 1]);
    expect(held({ ...open, lower: at })).toEqual([0, 0]);
  });

  test("takes one bound alone, on either side, and a start outside it", () => {
    const bound = Float64Array.of(3);
    close([minimiseSquares(line(), Float64Array.of(0), { lower: bound }).estimates[0]], [3], 1e-15);
    close([minimiseSquares(line(), Float64Array.of(9), { lower: bound }).estimates[0]], [3], 1e-15);
    close([minimiseSquares(line(), Float64Array.of(9), { upper: bound }).estimates[0]], [2.2], 1e-12);
    close(
      [minimiseSquares(line(), Float64Array.of(9), { upper: Float64Array.of(2) }).estimates[0]],
      [2],
      1e-15,
    );
  });

  test("finds a step that is damped into the radius", () => {
    const workspace = squaresWorkspace(1);
    workspace.triangle[0] = 2;
    workspace.projected[0] = 6;
    workspace.freeScale[0] = 2;
    // The undamped step is -3, of scaled length 6; within a radius of 1, to a tenth, it is -1/2.
    expect(trustRegionStep(workspace, 1, 7, 0)).toBe(0);
    expect(workspace.freeStep[0]).toBe(-3);
    const damping = trustRegionStep(workspace, 1, 1, 0);
    expect(Math.abs(2 * workspace.freeStep[0]! + 1)).toBeLessThan(0.1);
    // (R'R + damping D'D) d = -R'z.
    expect((4 + 4 * damping) * workspace.freeStep[0]!).toBeCloseTo(-12, 10);
  });

  // (R'R + damping D'D) d = -R'z with R'R = [[4, 2], [2, 10]], R'z = [2, 7] and D = diag(2, 3), and ||D d|| as asked for.
  test.each([3, 1, 0.3, 1e-3, 1e-8])("finds a step of two parameters within the radius %f", (radius) => {
    for (const guess of [0, 1e-6, 1, 1e9]) {
      const workspace = squaresWorkspace(2);
      workspace.triangle.set([2, 1, 0, 3]);
      workspace.projected.set([1, 2]);
      workspace.freeScale.set([2, 3]);
      const damping = trustRegionStep(workspace, 2, radius, guess);
      const [a, b] = workspace.freeStep;
      expect((4 + 4 * damping) * a! + 2 * b!).toBeCloseTo(-2, 9);
      expect(2 * a! + (10 + 9 * damping) * b!).toBeCloseTo(-7, 9);
      const length = Math.hypot(2 * a!, 3 * b!);
      if (damping > 0) expect(Math.abs(length / radius - 1)).toBeLessThanOrEqual(0.1);
      else expect(length).toBeLessThanOrEqual(1.1 * radius);
      // Undamped the step is (-1/6, -2/3), of scaled length 2.03.
      expect(damping === 0).toBe(radius > 2);
    }
  });
});

// By hand: R = [[2, 1], [0, 3]], z = [1, 2], d = [3, -1]: R d = [5, -3], ||z||^2 - ||z + R d||^2 = 5 - 37, z'R d = -1.
test("the linear model foretells the change of the sum and its slope", () => {
  const triangle = Float64Array.of(2, 1, Number.NaN, 3);
  expect(predictedReduction(triangle, Float64Array.of(1, 2), Float64Array.of(3, -1))).toBe(-32);
  expect(slopeAlong(triangle, Float64Array.of(1, 2), Float64Array.of(3, -1))).toBe(-1);
});
