import { expect, test } from "vitest";
import { figureData } from "../../kernel-helpers/figures/figure-data.js";
import { describeFigure } from "../../kernel-helpers/figures/figure-description.js";
import { type Figure, figure } from "../../kernel-helpers/figures/index.js";
import { plotSpec } from "../../kernel-helpers/figures/plot-spec.js";
import { observations, tableOf } from "../../src/record/index.js";

function drawn(
  cells: readonly string[],
  step: "month-end" | "iso-week" | "half-hour",
  count: number,
): Figure {
  const { axis } = observations(tableOf({ at: cells, v: cells.map((_, i) => i) }), {
    period: "at",
    step,
    value: "v",
  });
  const x = Array.from({ length: count }, (_, i) => i);
  return figure({
    title: "Stock",
    x: { title: "Date", periods: { axis, zero: 0 } },
    y: { title: "Coils" },
    layers: [
      { mark: "points", name: "counted", x, y: x.map((i) => 90 - i) },
      { mark: "vertical", name: "record ends", x: 1 },
    ],
  });
}

function ticksOf(shown: Figure, width: number): { tickvals: number[]; ticktext: string[] } {
  const { layout } = plotSpec(shown, width, false);
  return layout["xaxis"] as { tickvals: number[]; ticktext: string[] };
}

test("the ticks of a dated axis are labels of whole periods, as many as fit", () => {
  const monthly = drawn(["2025-01-31", "2025-02-28"], "month-end", 37);
  const wide = ticksOf(monthly, 900);
  expect(wide.ticktext[0]).toBe("2025-01-31");
  // Every tick is a month end, and the interval divides a year.
  const months = wide.tickvals[1]! - wide.tickvals[0]!;
  expect([1, 2, 3, 6, 12]).toContain(months);
  expect(wide.ticktext.at(-1)).toBe(
    new Date(Date.UTC(2025, wide.tickvals.at(-1)! + 1, 0)).toISOString().slice(0, 10),
  );
  expect(ticksOf(monthly, 380).ticktext.length).toBeLessThan(wide.ticktext.length);
});

test("weeks and half hours are labelled as in the record", () => {
  expect(ticksOf(drawn(["2026-W52", "2026-W53"], "iso-week", 4), 900).ticktext).toEqual([
    "2026-W52",
    "2026-W53",
    "2027-W01",
    "2027-W02",
  ]);
  expect(ticksOf(drawn(["2026-03-02 23:00", "2026-03-02 23:30"], "half-hour", 3), 900).ticktext.at(-1)).toBe(
    "2026-03-03 00:00",
  );
});

test("the description, the data table and the hover text of a figure show dates too", () => {
  const shown = drawn(["2025-01-31", "2025-02-28"], "month-end", 3);
  expect(describeFigure(shown)).toContain("record ends: vertical line at 2025-02-28.");
  expect(figureData(shown)[0]!.rows.map((row) => row["place"])).toEqual([
    "2025-01-31",
    "2025-02-28",
    "2025-03-31",
  ]);
  const [trace] = plotSpec(shown, 900, false).data;
  expect(trace!["text"]).toEqual(["2025-01-31", "2025-02-28", "2025-03-31"]);
});
