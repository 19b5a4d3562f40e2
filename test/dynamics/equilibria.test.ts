import { expect, test } from "vitest";
import { equilibria } from "../../src/dynamics/index.js";
import { recurrence } from "../../src/rule/index.js";

// Source: the equation r N (1 - N/K) = H solved by the quadratic formula; values printed to 10 decimals.
test("a catch below the largest sustainable one leaves an unstable and a stable level", () => {
  const rule = recurrence("ΔN = r*N*(1 - N/K) - H");
  const { points, search } = equilibria(rule, { parameters: { r: 0.5, K: 1000, H: 100 } });
  expect(search).toBe("every");
  expect(points.map(({ at }) => at["N"])).toEqual([
    expect.closeTo(276.39320225, 8),
    expect.closeTo(723.60679775, 8),
  ]);
  expect(points.map(({ verdict }) => verdict)).toEqual(["unstable", "stable"]);
});

test("the largest sustainable catch leaves one level, where the step touches the line of no change", () => {
  const rule = recurrence("ΔN = r*N*(1 - N/K) - H");
  const { points } = equilibria(rule, { parameters: { r: 0.5, K: 1000, H: 125 } });
  expect(points).toHaveLength(1);
  expect(points[0]!.at["N"]).toBeCloseTo(500, 3);
  expect(points[0]!.boundary).toBe("fold");
});

// Source: closed form H* = lam ln lam/((lam - 1) a c), P* = ln lam / a; printed to 10 decimals.
test("a host and its parasitoid rest at one place besides zero, which is unstable and turning", () => {
  const rule = recurrence("H[t+1] = lam*H*exp(-a*P)\nP[t+1] = c*H*(1 - exp(-a*P))");
  const { points } = equilibria(rule, {
    parameters: { lam: 2, a: 0.1, c: 1 },
    range: { H: [0, 100], P: [0, 100] },
  });
  expect(points).toHaveLength(2);
  expect(points[1]!.at["H"]).toBeCloseTo(13.8629436112, 9);
  expect(points[1]!.at["P"]).toBeCloseTo(6.9314718056, 9);
  expect(points[1]!.multipliers[0]!.modulus).toBeCloseTo(1.17741002, 8);
  expect(points[1]!.approach).toBe("turning");
});

test("jumps hide no rest level: where the step lands on it, and where it crosses", () => {
  // floor(N/2) + 3 = N at 5 (inside a step of the floor) and at 6 (where it jumps); worked out by hand.
  const { points, search } = equilibria(recurrence("N[t+1] = floor(N/2) + 3"));
  expect(search).toBe("every");
  expect(points.map(({ at }) => at["N"])).toEqual([5, 6]);
});

test("a jump over the line of no change is no rest level", () => {
  expect(equilibria(recurrence("N[t+1] = if(N < 2, 3, 1)"), { range: [-10, 10] }).points).toEqual([]);
});

test("where every value stays none is listed, and where none stays none is found", () => {
  expect(equilibria(recurrence("x[t+1] = R*x"), { parameters: { R: 1 } }).search).toBe("all-values");
  const moving = equilibria(recurrence("x[t+1] = x + c"), { parameters: { c: 1 } });
  expect([moving.points.length, moving.search]).toEqual([0, "every"]);
});
