import { expect, test } from "vitest";
import { figure } from "../../kernel-helpers/figures/figure.js";
import { figureData } from "../../kernel-helpers/figures/figure-data.js";
import { plotSpec } from "../../kernel-helpers/figures/plot-spec.js";
import { cellText } from "../../kernel-helpers/tables/cell-text.js";
import { numberFormat, tableText } from "../../kernel-helpers/tables/index.js";

function drawn(x: readonly number[]): ReturnType<typeof figure> {
  const layer = { mark: "points", name: "counted", x, y: x.map((place) => 2 * place) } as const;
  return figure({
    title: "Counts",
    panels: [{ title: "", x: { title: "year" }, y: { title: "N" }, layers: [layer] }],
  });
}

// Common practice, no source: a year is written 2026, an amount of that size 2,026.
test("years have no thousands separator in the data and on the axis of a figure", () => {
  const years = drawn([2024, 2025, 2026]);
  expect(tableText(figureData(years)[0]!)).toMatch(/\b2026 +4,052/);
  expect(plotSpec(years, 760, false).layout["xaxis"]).toMatchObject({ separatethousands: false });
  expect(plotSpec(years, 760, false).layout["yaxis"]).toMatchObject({ separatethousands: true });
  const hours = drawn([0, 1200, 2026]);
  expect(tableText(figureData(hours)[0]!)).toMatch(/\b2,026 +4,052/);
  expect(plotSpec(hours, 760, false).layout["xaxis"]).toMatchObject({ separatethousands: true });
});

test("a column can turn off thousands separators", () => {
  const column = { key: "year", label: "Year", kind: "integer", grouped: false } as const;
  expect(cellText(column, { year: 2026 }, numberFormat())).toBe("2026");
  expect(cellText({ ...column, grouped: true }, { year: 2026 }, numberFormat())).toBe("2,026");
});
