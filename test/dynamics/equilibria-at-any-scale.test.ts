import { describe, expect, test } from "vitest";
import { equilibria } from "../../src/dynamics/index.js";
import { type Rule, recurrence, rules } from "../../src/rule/index.js";

type Values = Readonly<Record<string, number>>;

const scales = [1e-9, 1e-4, 1, 1e5, 1e12];

/** Compares with what is expected, in units of the scale; what is 0 must be 0. */
function expectLevels(found: readonly number[], expected: readonly number[], scale: number): void {
  expect(found).toHaveLength(expected.length);
  expected.forEach((value, i) => {
    expect(Math.abs(found[i]! - value * scale)).toBeLessThanOrEqual(1e-9 * Math.abs(value) * scale);
  });
}

// Closed forms by solving x = f(x) by hand, at scale 1; parameters in the unit of the state grow with the scale (first),
// those in its reciprocal shrink (second), the others stay.
const ofOneState: readonly (readonly [Rule, Values, Values, Values, readonly number[]])[] = [
  [rules.geometric(), {}, {}, { R: 1.07 }, [0]],
  [rules.affine(), { b: 4 }, {}, { a: 0.9 }, [40]],
  [rules.affine(), { b: 4 }, {}, { a: 0.99999 }, [4e5]],
  [rules.dosing(), { D: 500 }, {}, { rho: 0.4 }, [500 / 0.6]],
  [rules.logistic(), { K: 3 }, {}, { r: 0.5 }, [0, 3]],
  [rules.logistic(), { K: 3 }, {}, { r: 3 }, [0, 3]],
  [rules.bevertonHolt(), { K: 3 }, {}, { R: 1.5 }, [0, 3]],
  [rules.ricker(), { K: 3 }, {}, { r: 1.2 }, [0, 3]],
  [rules.hassell(), {}, { a: 1 }, { lam: 10, b: 2 }, [0, Math.sqrt(10) - 1]],
  [rules.maynardSmithSlatkin(), {}, { a: 1 }, { lam: 3, b: 2.5 }, [0, 2 ** 0.4]],
  [rules.thetaLogistic(), { K: 3 }, {}, { r: 0.7, theta: 1.5 }, [0, 3]],
  [rules.allee(), { K: 1, A: 0.2 }, {}, { r: 0.2 }, [0, 0.2, 1]],
  [rules.pellaTomlinson(), { K: 1, C: 0 }, {}, { r: 0.4, m: 1.5 }, [0, 1]],
  [rules.schaefer(), { K: 1, C: 0.09 }, {}, { r: 0.4 }, [(1 - Math.sqrt(0.1)) / 2, (1 + Math.sqrt(0.1)) / 2]],
  [rules.chemostat(), { K: 1 }, {}, { d: 0.2, R: 2 }, [0, 0.6]],
  [rules.transfer(), { K: 1 }, {}, { G: 40, D: 10 }, [0, 30 / 39]],
  [rules.delayedDensity({ lag: 1 }), { K: 3 }, {}, { r: 0.5 }, [0, 3]],
  [rules.adultsAndRecruits({ lag: 1 }), {}, { b: 1 }, { s: 0.6, a: 1.5 }, [0, 1.5 / 0.4 - 1]],
  [recurrence("N[t+1] = lam*N*exp(-a*N)"), {}, { a: 1 }, { lam: 2 }, [0, Math.LN2]],
  [recurrence("ΔN = r*N*(1 - N/K) - h*N"), { K: 3 }, {}, { r: 0.5, h: 0.1 }, [0, 2.4]],
  [recurrence("x[t+1] = x + c"), { c: 2 }, {}, {}, []],
];

describe.each(ofOneState)(
  "$text has its equilibria without a range",
  (rule, growing, shrinking, fixed, levels) => {
    test.each(scales)("at scale %d", (scale) => {
      const grown = Object.entries(growing).map(([name, value]) => [name, value * scale]);
      const shrunk = Object.entries(shrinking).map(([name, value]) => [name, value / scale]);
      const values = { ...fixed, ...Object.fromEntries([...grown, ...shrunk]) } as Values;
      const parameters = Object.fromEntries(rule.parameters.map((name) => [name, values[name]!]));
      const inputs = Object.fromEntries(rule.inputs.map((name) => [name, values[name]!]));
      const { points, search } = equilibria(rule, { parameters, inputs });
      expect(search).toBe("every");
      expectLevels(
        points.map(({ at }) => at[rule.states[0]!]!),
        levels,
        scale,
      );
    });
  },
);

// Source: H = lam ln lam/((lam - 1) a c), P = ln lam/a, and for the clumped one H = lam P/((lam - 1) c),
// P = k (lam^(1/k) - 1)/a; competitors by solving N1 + a12 N2 = K1, a21 N1 + N2 = K2 with K = M (R - 1).
test.each(scales)("systems have theirs at scale %d", (scale) => {
  const host = equilibria(rules.nicholsonBailey(), { parameters: { lam: 2, a: 1 / scale, c: 1 } }).points;
  expectLevels(
    host.flatMap(({ at }) => [at["H"]!, at["P"]!]),
    [0, 0, 2 * Math.LN2, Math.LN2],
    scale,
  );
  const clumped = equilibria(rules.clumpedParasitoid(), {
    parameters: { lam: 2, a: 1 / scale, c: 1, k: 0.5 },
  });
  expectLevels(
    clumped.points.flatMap(({ at }) => [at["H"]!, at["P"]!]),
    [0, 0, 3, 1.5],
    scale,
  );
  const rivals = equilibria(rules.competition(), {
    parameters: { R1: 1.6, R2: 1.9, M1: scale, M2: 0.8 * scale, a12: 0.4, a21: 0.5 },
  });
  const levels = [0, 0, 0, 0.72, 0.39, 0.525, 0.6, 0];
  expectLevels(
    rivals.points.flatMap(({ at }) => [at["N1"]!, at["N2"]!]),
    levels,
    scale,
  );
});
