import { expect, test } from "vitest";
import { noiseCapacity, noiseStream } from "../../src/dynamics/index.js";
import { normalCdf } from "../../src/numeric/index.js";

const lots = 256;
const count = lots * noiseCapacity;

function sample(): Float64Array {
  const stream = noiseStream(20260401);
  const all = new Float64Array(count);
  for (let k = 0; k < lots; k++) all.set(stream.normals(noiseCapacity), k * noiseCapacity);
  return all;
}

// Source: moments of the standard normal 0, 1, 0, 3, 15 (6th); each within 5 standard errors of its mean.
test("normal values have the moments of the normal distribution", () => {
  const values = sample();
  const moment = (k: number): number => values.reduce((sum, z) => sum + z ** k, 0) / count;
  const error = (variance: number): number => 5 * Math.sqrt(variance / count);
  expect(Math.abs(moment(1))).toBeLessThan(error(1));
  expect(Math.abs(moment(2) - 1)).toBeLessThan(error(2));
  expect(Math.abs(moment(3))).toBeLessThan(error(15));
  expect(Math.abs(moment(4) - 3)).toBeLessThan(error(96));
  expect(Math.abs(moment(6) - 15)).toBeLessThan(error(10170));
});

// Source: the largest gap of a sample of n to the distribution exceeds 1.95/sqrt n with probability 0.001
// (Kolmogorov's limit, from memory).
test("normal values follow the normal distribution everywhere, the tail included", () => {
  const values = sample().sort();
  let gap = 0;
  values.forEach((z, i) => {
    gap = Math.max(gap, Math.abs(normalCdf(z) - (i + 0.5) / count));
  });
  expect(gap).toBeLessThan(1.95 / Math.sqrt(count));
  // Beyond the last layer at 3.654 lie 2 (1 - Phi) of the values.
  const beyond = values.filter((z) => Math.abs(z) > 3.6541528853610088).length;
  const expected = count * 2 * normalCdf(-3.6541528853610088);
  expect(Math.abs(beyond - expected)).toBeLessThan(5 * Math.sqrt(expected));
});

test("neighbours are not correlated, in value or in size", () => {
  const values = sample();
  const lag = (of: (z: number) => number): number => {
    let sum = 0;
    for (let i = 1; i < count; i++) sum += of(values[i]!) * of(values[i - 1]!);
    return sum / count;
  };
  expect(Math.abs(lag((z) => z))).toBeLessThan(5 / Math.sqrt(count));
  expect(Math.abs(lag((z) => (z * z - 1) / Math.SQRT2))).toBeLessThan(5 / Math.sqrt(count));
});

// Source: the language's own exponential; the kernel's is off by less than 2 units in the last place.
test("factors are exponentials of the same normal values", () => {
  const plain = noiseStream(5).normals(1000).slice();
  const factors = noiseStream(5).factors(1000, -0.125, 0.5);
  plain.forEach((z, i) => {
    const exact = Math.exp(-0.125 + 0.5 * z);
    expect(Math.abs(factors[i]! - exact)).toBeLessThanOrEqual(3 * Number.EPSILON * exact);
  });
});

test("the values do not depend on the sizes of the lots, nor on other streams in between", () => {
  const whole = noiseStream(9).normals(100).slice();
  const stream = noiseStream(9);
  const other = noiseStream(10);
  const parts = [7, 13, 80].flatMap((size) => {
    other.normals(3);
    return [...stream.normals(size)];
  });
  expect(parts).toEqual([...whole]);
});

// Source: the values this build gives are fixed by integer arithmetic and correctly rounded operations alone, so the
// moments above may be checked on any machine; here only that two seeds differ.
test("seeds give different values", () => {
  expect([...noiseStream(1).normals(4).slice()]).not.toEqual([...noiseStream(2).normals(4)]);
});
