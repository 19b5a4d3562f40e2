import fc from "fast-check";
import { expect, test } from "vitest";
import { downsample } from "../../kernel-helpers/figures/downsample.js";
import { recordFigure } from "../../kernel-helpers/figures/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";

const many = Array.from({ length: 100_000 }, (_, i) => i);

test("100,000 points are downsampled with all extremes, and the figure says so", async () => {
  const y = many.map((i) => Math.sin(i / 4000));
  y[54_321] = 40;
  y[1_234] = -17;
  const kept = downsample(many, y)?.kept ?? [];
  expect(kept).toContain(54_321);
  expect(kept).toContain(1_234);
  expect(kept.length).toBeLessThan(2500);
  const gauge = {
    title: "Level",
    x: { title: "Second" },
    y: { title: "Level", unit: "m" },
    series: [{ name: "gauge", x: many, y }],
  };
  const bundle = await bundleOf(recordFigure(gauge));
  const said = /gauge: [\d,]+ of 100,000 points plotted, including all extremes\./;
  expect(bundle?.["text/plain"]).toMatch(said);
  expect(bundle?.["text/html"]).toMatch(said);
});

test("of any long series the first and last points and the extremes of both axes are kept, in order", () => {
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 1e6 }), fc.integer({ min: 4001, max: 9000 }), (seed, length) => {
      const value = (i: number): number => Math.sin(seed + i * i) * ((i % 97) + 1);
      const x = Array.from({ length }, (_, i) => value(i + 3));
      const y = Array.from({ length }, (_, i) => (i % 50 === 7 ? Number.NaN : value(i)));
      const kept = downsample(x, y)?.kept ?? [];
      const finite = y.filter((each) => !Number.isNaN(each));
      for (const [values, all] of [
        [x, x],
        [y, finite],
      ] as const) {
        const drawn = kept.map((i) => values[i] as number).filter((each) => !Number.isNaN(each));
        expect(drawn.reduce((a, b) => Math.min(a, b))).toBe(all.reduce((a, b) => Math.min(a, b)));
        expect(drawn.reduce((a, b) => Math.max(a, b))).toBe(all.reduce((a, b) => Math.max(a, b)));
      }
      expect(kept[0]).toBe(0);
      expect(kept.at(-1)).toBe(length - 1);
      expect([...kept].sort((a, b) => a - b)).toEqual(kept);
    }),
    { seed: 5, numRuns: 20 },
  );
});

test("a short series is not downsampled", () => {
  expect(downsample([1, 2, 3], [1, 2, 3])).toBeUndefined();
});
