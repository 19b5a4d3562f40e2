import fc from "fast-check";
import { expect, test } from "vitest";
import { quantile } from "../../src/numeric/index.js";

// Source: Hyndman and Fan (1996), definition 7: p_k = (k - 1)/(n - 1).
test("quantile uses definition 7", () => {
  const sample = Float64Array.of(1, 3, 4, 10, 20);
  expect([0, 0.25, 0.3, 0.5, 1].map((p) => quantile(sample, p))).toEqual([1, 3, 3.2, 4, 20]);
});

test("quantiles rise with the probability and stay inside the sample", () => {
  const samples = fc.array(fc.double({ noNaN: true, min: -1e6, max: 1e6 }), { minLength: 1 });
  const share = fc.double({ min: 0, max: 1, noNaN: true });
  fc.assert(
    fc.property(samples, share, share, (values, a, b) => {
      const sorted = Float64Array.from(values).sort();
      const [low, high] = [quantile(sorted, Math.min(a, b)), quantile(sorted, Math.max(a, b))];
      expect(low).toBeLessThanOrEqual(high + 1e-9 * Math.abs(high));
      expect(low).toBeGreaterThanOrEqual(sorted[0]!);
    }),
    { seed: 4 },
  );
});

test("refuses an empty sample", () => {
  expect(() => quantile([], 0.5)).toThrow(expect.objectContaining({ code: "empty-sample" }));
});
