import { expect, test } from "vitest";
import { exactTrajectory } from "../../src/dynamics/index.js";
import { recurrence, rules } from "../../src/rule/index.js";

const fibonacci = recurrence("F[t+1] = F + F[t-1]");

// Source: Fibonacci numbers by the fast doubling identities, an algorithm of its own:
// F(2k) = F(k)(2 F(k+1) - F(k)), F(2k+1) = F(k)^2 + F(k+1)^2.
function doubling(n: number): readonly [bigint, bigint] {
  if (n === 0) return [0n, 1n];
  const [a, b] = doubling(Math.floor(n / 2));
  const even = a * (2n * b - a);
  const odd = a * a + b * b;
  return n % 2 === 0 ? [even, odd] : [odd, even + odd];
}

test("Fibonacci numbers are exact to F(1000)", () => {
  // The first value is F(1), the one before it F(0).
  const { values } = exactTrajectory(fibonacci, { initial: { F: [0, 1] }, periods: 999 });
  expect(values["F"]![29]).toBe("832040");
  expect(values["F"]![49]).toBe("12586269025");
  expect(values["F"]![77]).toBe("8944394323791464");
  expect(values["F"]![999]).toBe(String(doubling(1000)[0]));
  // Source: F(1000) begins 43466557686937456435... and has 209 digits (from memory).
  expect(values["F"]![999]).toMatch(/^43466557686937456435/u);
  expect(values["F"]![999]).toHaveLength(209);
});

// Source: closed form x0 a^t + b (1 - a^t)/(1 - a) worked out in whole numbers over 3^t.
test("forty terms of an affine rule are exact fractions", () => {
  const { values } = exactTrajectory(rules.affine(), {
    parameters: { a: "2/3", b: "1/7" },
    initial: { x: 5 },
    periods: 40,
  });
  for (let t = 0; t <= 40; t++) {
    const [two, three] = [2n ** BigInt(t), 3n ** BigInt(t)];
    // 5 (2/3)^t + 3/7 (1 - (2/3)^t) = (32 * 2^t + 3 * 3^t)/(7 * 3^t)
    const above = 32n * two + 3n * three;
    const below = 7n * three;
    const divisor = ((a: bigint, b: bigint): bigint => {
      let [x, y] = [a, b];
      while (y !== 0n) [x, y] = [y, x % y];
      return x;
    })(above, below);
    const text = below === divisor ? `${above / divisor}` : `${above / divisor}/${below / divisor}`;
    expect(values["x"]![t]).toBe(text);
  }
});

// Source: common practice, no source: x10 of 4x(1 - x) from 1/10 has a denominator of 716 digits.
test("the digits of the quadratic map double with every step", () => {
  const rule = recurrence("x[t+1] = 4*x*(1 - x)");
  const { values } = exactTrajectory(rule, { initial: { x: 0.1 }, periods: 10 });
  expect(values["x"]![10]!.split("/")[1]).toHaveLength(716);
});

test("decimals are read as they print, and computer numbers nearest to fractions are given", () => {
  const { values, numbers } = exactTrajectory(rules.geometric(), {
    parameters: { R: 0.1 },
    initial: { x: "1/3" },
    periods: 2,
  });
  expect(values["x"]).toEqual(["1/3", "1/30", "1/300"]);
  expect([...numbers["x"]!]).toEqual([1 / 3, 1 / 30, 1 / 300]);
});

test("functions without exact values are refused", () => {
  expect(() =>
    exactTrajectory(rules.ricker(), { parameters: { r: 1, K: 10 }, initial: { N: 1 }, periods: 1 }),
  ).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The rule needs the function exp, which has no exact fraction. Use path instead, which works in computer numbers.]`,
  );
});

test("a path whose digits grow without end is refused, not run", () => {
  const rule = recurrence("x[t+1] = 4*x*(1 - x)");
  expect(() => exactTrajectory(rule, { initial: { x: 0.1 }, periods: 100 })).toThrow(
    expect.objectContaining({ code: "too-many-digits" }),
  );
});

// Source: Python 3.11, // and % of fractions (floor division): the remainder has the sign of the divisor.
test.each([
  ["mod(x, 3)", "-7", "2"],
  ["mod(x, 3)", "7", "1"],
  ["mod(x, -3)", "7", "-2"],
  ["mod(x, -3)", "-7", "-1"],
  ["mod(x, 3)", "-6", "0"],
  ["mod(x, 1/2)", "-2/3", "1/3"],
  ["floor(x)", "-7/2", "-4"],
  ["floor(x)", "7/2", "3"],
  ["ceil(x)", "-7/2", "-3"],
  ["ceil(x)", "7/2", "4"],
  ["round(x, 0)", "-7/2", "-4"],
  ["round(x, 0)", "5/2", "3"],
  ["round(x, 1)", "-1/3", "-3/10"],
  ["abs(x)", "-7/2", "7/2"],
  ["sign(x)", "-7/2", "-1"],
])("%s of %s is exactly %s", (text, x, value) => {
  const { values } = exactTrajectory(recurrence(`x[t+1] = ${text}`), { initial: { x }, periods: 1 });
  expect(values["x"]![1]).toBe(value);
});
