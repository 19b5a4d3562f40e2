import { describe, expect, test } from "vitest";
import { differences, type ObservationOptions, observations, tableOf } from "../../src/record/index.js";

const hours: ObservationOptions = { period: "hours", step: { every: 12, of: "hour" }, value: "density" };

/** Name, code and message of what is thrown. */
function refusalOf(work: () => unknown): { readonly code: string; readonly message: string } {
  try {
    work();
  } catch (thrown) {
    return thrown as { code: string; message: string };
  }
  throw new Error("Nothing was refused.");
}

describe("observations", () => {
  test("counts whole steps from the first row and keeps a gap as a gap", () => {
    const counts = observations(tableOf({ hours: [24, 36, 60], density: [2, 3.1, 7.4] }), hours);
    expect(Array.from(counts.groups[0]!.index)).toEqual([0, 1, 3]);
    expect(Array.from(counts.groups[0]!.time)).toEqual([24, 36, 60]);
    expect(counts.findings.map(({ kind }) => kind)).toEqual(["gap", "mixed-steps"]);
    expect(counts.findings[0]!.message).toBe("Row 3: hours 60 follows 36; one period is missing.");
    expect(counts.findings[1]!.message).toBe(
      "Steps of 12 and 24 hours occur: the rule is applied per 12 hours; 1 pair spans 2 steps.",
    );
    expect(counts.counts).toEqual({ read: 3, used: 3, flagged: 1, corrected: 0, refused: 0 });
  });

  test("leaves an empty cell out as missing, never as zero", () => {
    const counts = observations(tableOf({ hours: [0, 12, 24], density: [2, "", 7.4] }), hours);
    expect(Array.from(counts.groups[0]!.values["density"]!)).toEqual([2, 7.4]);
    expect(Array.from(counts.groups[0]!.rows)).toEqual([1, 3]);
    expect(counts.counts).toEqual({ read: 3, used: 2, flagged: 2, corrected: 0, refused: 1 });
  });

  test("keeps series apart, each from its own first row", () => {
    const table = tableOf({
      flask: ["a", "a", "b", "b", "b"],
      hours: [0, 12, 12, 24, 36],
      density: [1, 2, 3, 4, 5],
    });
    const counts = observations(table, { ...hours, by: "flask" });
    expect(counts.groups.map(({ name, index }) => [name, Array.from(index)])).toEqual([
      ["a", [0, 1]],
      ["b", [0, 1, 2]],
    ]);
  });

  test("puts month ends one month apart whatever their day", () => {
    const table = tableOf({ date: ["2024-01-31", "2024-02-29", "2024-03-31"], owed: [300, 200, 100] });
    const owed = observations(table, { period: "date", step: "month-end", value: "owed" });
    expect(Array.from(owed.groups[0]!.index)).toEqual([0, 1, 2]);
    expect(owed.groups[0]!.labels).toEqual(["2024-01-31", "2024-02-29", "2024-03-31"]);
  });

  test("refuses with the row, the column, the value and what to do", () => {
    const refused = (columns: Record<string, unknown[]>, options: ObservationOptions = hours) => {
      const { code, message } = refusalOf(() => observations(tableOf(columns), options));
      return `${code}: ${message}`;
    };
    expect([
      refused({ hours: [], density: [] }),
      refused({ hours: [0], densty: [1] }),
      refused({ hours: [0, 12], density: [1, "n.d."] }),
      refused({ hours: [0, 12], density: [1, "1.234,56"] }),
      refused({ hours: [0, 12, 12], density: [1, 2, 3] }),
      refused({ hours: [0, 12, 6], density: [1, 2, 3] }),
      refused({ hours: [0, 12, 29], density: [1, 2, 3] }),
      refused({ hours: [0, 12], density: [1, 2] }, { period: "hours", value: "density" }),
      refused({ day: ["03/04/2025"], density: [1] }, { ...hours, period: "day" }),
    ]).toMatchInlineSnapshot(`
      [
        "no-data-rows: No data rows were found. Give a record with at least one row below its header.",
        "missing-column: The record has no column "density", asked for as a value. Its columns are "hours", "densty". Did you mean "densty"?",
        "not-a-number: Row 2, density: "n.d." is not a number. If it marks a missing value, read the file with missing: ["n.d."]; otherwise correct the cell.",
        "decimal-sign-unclear: Row 2, density: "1.234,56" - decimal sign unclear; choose comma or point. Read the file with decimal: "," or decimal: ".".",
        "duplicate-period: hours 12 appears 2 times, at rows 2 and 3, with different values (2, 3). Possible duplicate - keep both? Say duplicates: "average", "first", "last" or "sum", or name the replicates column.",
        "not-increasing: Times are not increasing at row 3: hours 6 follows 12. If several series are mixed, name the column that tells them apart with by. To put the rows in order, say disorder: "sort".",
        "off-step: Row 3, hours: 29 lies 2.41667 steps of 12 hours after the first row, not a whole number of steps. Choose a step that divides the periods, or say offStep: "nearest".",
        "step-missing: The length of one step is not stated, and no length is assumed. The closest rows lie 12 apart in "hours": say step: { every: 12, of: "hour" } if that is one step.",
        "ambiguous-date: Row 1, day: "03/04/2025" - ambiguous date. Write dates as 2026-03-31, or read the file with dates: "day-month-year" or dates: "month-day-year".",
      ]
    `);
  });

  test("asks for a forgotten step with the one that fits the record", () => {
    const asked = (period: unknown[]) => {
      const { message } = refusalOf(() =>
        observations(tableOf({ at: period, v: period.map((_, i) => i) }), { period: "at", value: "v" }),
      );
      return message.slice(message.indexOf("The closest"));
    };
    expect([
      asked(["2026-01-31", "2026-02-28", "2026-03-31"]),
      asked(["2026-01-15", "2026-02-15"]),
      asked(["2024-06-01", "2025-06-01"]),
      asked(["2026-01-05", "2026-01-12"]),
      asked(["2026-01-05", "2026-01-06"]),
      asked(["2026-01-05 09:00", "2026-01-05 09:30"]),
      asked(["2026-01-05 09:00", "2026-01-05 15:00"]),
      asked([0, 0.5, 1.5]),
    ]).toMatchInlineSnapshot(`
      [
        "The closest rows lie one month apart in "at": say step: "month-end" if that is one step.",
        "The closest rows lie one month apart in "at": say step: "month" if that is one step.",
        "The closest rows lie one year apart in "at": say step: "year" if that is one step.",
        "The closest rows lie one week apart in "at": say step: "week" if that is one step.",
        "The closest rows lie one day apart in "at": say step: "day" if that is one step.",
        "The closest rows lie half an hour apart in "at": say step: "half-hour" if that is one step.",
        "The closest rows lie 6 hours apart in "at": say step: { every: 6, of: "hour" } if that is one step.",
        "The closest rows lie 0.5 apart in "at": say step: { every: 0.5, of: "hour" }, or whatever unit the column counts, if that is one step.",
      ]
    `);
  });

  test("names the one bad cell of a column of numbers, whatever their decimal sign", () => {
    const text = { hours: [0, 12, 24], density: ["240,0", "15O,2", "160,1"] };
    expect(() => observations(tableOf(text), hours)).toThrow('Row 2, density: "15O,2" is not a number.');
    const mixed = { hours: [0, 12, 24], density: [240, "n/a", 160.1] };
    expect(() => observations(tableOf(mixed), hours)).toThrow(
      'Row 2, density: "n/a" is not a number. If it marks a missing value, read the file with missing: ["n/a"]',
    );
  });

  test("refuses options that it would have to pass over or misread", () => {
    const refused = (options: object) =>
      refusalOf(() => observations(tableOf({ hours: [0, 0], density: [1, 2] }), { ...hours, ...options }))
        .message;
    expect([
      refused({ peroid: "hours" }),
      refused({ duplicates: "mean" }),
      refused({ value: ["density"] }),
    ]).toMatchInlineSnapshot(`
      [
        "There is no option "peroid". There are disorder, offStep, value, replicates, weight, order, period, step, values, unit, by, where, rows, censored, measured, inputs, duplicates, identities. Did you mean "period"?",
        "The option "duplicates" is "mean"; it must be one of refuse, average, sum, first, last.",
        "The option "value" is "["density"]"; it must be a text.",
      ]
    `);
    expect(() => differences({ hours: [0] } as never)).toThrow(
      "Differences are taken of observations; this is a value of type object.",
    );
  });
});
