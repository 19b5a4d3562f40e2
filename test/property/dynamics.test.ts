import * as fc from "fast-check";
import { expect, test } from "vitest";
import {
  closedForm,
  closedFormAt,
  cycles,
  equilibria,
  exactTrajectory,
  guaranteedDigits,
  trajectory,
} from "../../src/dynamics/index.js";
import { recurrence, rules } from "../../src/rule/index.js";
import { expressionText } from "./arbitraries/rule-text.js";

const seeded = { seed: 20260401, numRuns: 60 };
const between = (min: number, max: number): fc.Arbitrary<number> => fc.double({ min, max, noNaN: true });
const small = fc.integer({ min: -6, max: 6 });

test("going m + k periods is going m and then k, bit for bit", () => {
  const whole = fc.integer({ min: 0, max: 12 });
  void fc.assert(
    fc.property(expressionText(false), between(-5, 5), whole, whole, (text, start, m, k) => {
      const one = text.replace(/P(\[t-2\])?|N\[t-1\]|\bu\b(\[t\+1\])?/gu, "N");
      const rule = recurrence(`ΔN = ${one} + 0*r*K`);
      const options = { parameters: { r: 0.75, K: 1.5 } };
      const together = trajectory(rule, { ...options, initial: { N: start }, periods: m + k });
      const first = trajectory(rule, { ...options, initial: { N: start }, periods: m });
      if (first.stop.kind !== "complete") return;
      const initial = { N: first.values["N"]!.at(-1)! };
      const second = trajectory(rule, { ...options, initial, startsAt: m, periods: k });
      expect([...second.values["N"]!]).toEqual([...together.values["N"]!.subarray(m)]);
      expect(second.stop.kind).toBe(together.stop.kind);
    }),
    { ...seeded, numRuns: 300 },
  );
});

test("rest levels stay put to 1e-12 of their size, and a polynomial's are all found", () => {
  // ΔN = c (N - a)(N - b)(N - d): the rest levels are a, b, d.
  const gap = between(0.1, 40);
  void fc.assert(
    fc.property(between(-50, 0), gap, gap, between(0.001, 0.01), (a, first, second, c) => {
      const [b, d] = [a + first, a + first + second];
      const sorted = [a, b, d];
      const rule = recurrence("ΔN = c*(N - a)*(N - b)*(N - d)");
      const found = equilibria(rule, { parameters: { a, b, c, d }, range: [-100, 100] });
      expect(found.points).toHaveLength(3);
      found.points.forEach((point, i) => {
        expect(Math.abs(point.at["N"]! - sorted[i]!)).toBeLessThan(1e-10 * 100);
        expect(point.residual).toBeLessThanOrEqual(1e-12 * 100);
        const [x, y] = sorted.filter((_, j) => j !== i).map((other) => sorted[i]! - other);
        expect(point.multipliers[0]!.re).toBeCloseTo(1 + c * x! * y!, 6);
      });
    }),
    seeded,
  );
});

test("a cycle's multiplier is the product of the slopes along it", () => {
  void fc.assert(
    fc.property(between(3.1, 4), fc.integer({ min: 1, max: 4 }), (r, period) => {
      const rule = recurrence("x[t+1] = r*x*(1 - x)");
      for (const cycle of cycles(rule, { parameters: { r }, period, range: [0, 1] }).cycles) {
        const product = cycle.points.reduce((slope, x) => slope * r * (1 - 2 * x), 1);
        expect(Math.abs(cycle.multiplier.re - product)).toBeLessThanOrEqual(
          1e-9 * Math.max(1, Math.abs(product)),
        );
        expect(cycle.residual).toBeLessThan(1e-12);
      }
    }),
    { ...seeded, numRuns: 25 },
  );
});

test("the closed form of a linear rule is its exact path, whatever its roots", () => {
  void fc.assert(
    fc.property(small, small, small, small, fc.tuple(small, small, small), (a, b, c, added, start) => {
      const rule = recurrence("x[t+1] = a*x + b*x[t-1] + c*x[t-2] + d");
      const parameters = { a, b, c, d: added };
      const initial = { x: start };
      const form = closedForm(rule, { parameters, initial });
      const exact = exactTrajectory(rule, { parameters, initial, periods: 12 }).numbers["x"]!;
      const scale = Math.max(1, ...exact.map(Math.abs));
      exact.forEach((value, t) => {
        // Rounding grows with the largest root to the power t and the closeness of the roots.
        expect(Math.abs(closedFormAt(form, t)["x"]! - value)).toBeLessThanOrEqual(1e-7 * scale);
      });
      expect(form.roots.reduce((count, { times }) => count + times, 0)).toBe(added === 0 ? 3 : 4);
    }),
    { ...seeded, numRuns: 200 },
  );
});

test("iteration and closed form agree to the stated number of digits, to the stated period", () => {
  void fc.assert(
    fc.property(between(1.05, 4), between(1, 1e4), between(0.001, 2), (R, K, part) => {
      const options = { parameters: { R, K }, initial: { N: part * K } };
      const { periods, digits } = guaranteedDigits(rules.bevertonHolt(), { ...options, periods: 60 });
      const form = closedForm(rules.bevertonHolt(), options);
      const run = trajectory(rules.bevertonHolt(), { ...options, periods });
      run.values["N"]!.forEach((value, t) => {
        expect(Math.abs(closedFormAt(form, t)["N"]! / value - 1)).toBeLessThanOrEqual(10 ** -digits);
      });
      expect(periods).toBe(60);
    }),
    seeded,
  );
});

test("digits that are guaranteed are right, chaos or not", () => {
  void fc.assert(
    fc.property(fc.integer({ min: 20, max: 40 }), fc.integer({ min: 1, max: 9 }), (tenths, start) => {
      const rule = recurrence("x[t+1] = r*x*(1 - x)");
      const options = { parameters: { r: tenths / 10 }, initial: { x: start / 10 } };
      const { periods } = guaranteedDigits(rule, { ...options, digits: 11, periods: 9 });
      const exact = exactTrajectory(rule, { ...options, periods }).numbers["x"]!;
      const stepped = trajectory(rule, { ...options, periods }).values["x"]!;
      exact.forEach((value, t) => {
        expect(Math.abs(stepped[t]! - value)).toBeLessThanOrEqual(1e-11 * Math.abs(value));
      });
    }),
    seeded,
  );
});
