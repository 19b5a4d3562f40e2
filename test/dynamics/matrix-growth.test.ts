import { expect, test } from "vitest";
import { matrixGrowth } from "../../src/dynamics/index.js";
import { recurrence, rules } from "../../src/rule/index.js";

// Source: characteristic polynomial z^3 - 2 z - 3/8 = (z - 3/2)(z^2 + 3/2 z + 1/4), solved by hand:
// roots 3/2 and (-3 +- sqrt 5)/4; stable structure 18 : 6 : 1.
test("three ages grow by 1.5 a period in proportions 18 : 6 : 1", () => {
  const growth = matrixGrowth(rules.ages({ ages: 3 }), {
    parameters: { f1: 0, f2: 4, f3: 3, s1: 0.5, s2: 0.25 },
  });
  expect(growth.dominant).toBeCloseTo(1.5, 14);
  expect(growth.multipliers[1]!.re).toBeCloseTo((-3 - Math.sqrt(5)) / 4, 13);
  expect(growth.multipliers[2]!.re).toBeCloseTo((-3 + Math.sqrt(5)) / 4, 13);
  expect(growth.structure[0]! / growth.structure[2]!).toBeCloseTo(18, 11);
  expect(growth.structure[1]! / growth.structure[2]!).toBeCloseTo(6, 11);
  expect(growth.elasticities.flat().reduce((sum, value) => sum + value, 0)).toBeCloseTo(1, 12);
  expect(growth.dampingRatio).toBeCloseTo(1.5 / 1.30901699437, 10);
});

test("sensitivities are the slopes of the dominant root", () => {
  const parameters = { f1: 0.1, f2: 2, f3: 3, s1: 0.4, s2: 0.3 };
  const at = (more: object) =>
    matrixGrowth(rules.ages({ ages: 3 }), { parameters: { ...parameters, ...more } });
  const slope = (at({ f2: 2 + 1e-5 }).dominant - at({ f2: 2 - 1e-5 }).dominant) / 2e-5;
  expect(at({}).sensitivities[0]![1]).toBeCloseTo(slope, 8);
});

test("a rule that is no matrix is refused", () => {
  expect(() => matrixGrowth(recurrence("N[t+1] = 2*N + 1"))).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The long run of a matrix is asked for, and this rule is no matrix with a positive dominant root: each line must be a sum of parameters times states, as in n1[t+1] = f1*n1 + f2*n2. Use equilibria for other systems.]`,
  );
});
