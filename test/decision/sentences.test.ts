// What a sentence must not hide: a rival period, a time within the record, a reading that comes too late.
import { describe, expect, test } from "vitest";
import { nextReading, timeToReach } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { forecast } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

describe("a debt whose instalments bring it to 1000 about month 35", () => {
  const owed = [
    9004.71, 8787.02, 8583.37, 8380.14, 8163.47, 7957.21, 7746.21, 7527.63, 7310.43, 7101.84, 6888.45,
    6661.55, 6443.1, 6231.67, 5997.99, 5774.21, 5563.47, 5317.1, 5100.68, 4857.26, 4633.5, 4411.82, 4176.84,
    3931.25,
  ];
  const record = observations(tableOf({ month: owed.map((_, i) => i), owed }), {
    period: "month",
    step: { every: 1, of: "month" },
    value: "owed",
    unit: "crowns",
  });
  const fitted = fit(recurrence("owed[t+1] = (1 + i)*owed - p"), record, { errors: "observation" });
  const found = timeToReach(forecast(fitted, { periods: 24 }), { fallsTo: 1000 });

  test("names both months with their chances", () => {
    const { distribution } = found.groups[0]!;
    const chance = (month: number): number => distribution.find(({ time }) => time === month)!.share;
    expect(chance(35)).toBeGreaterThan(0.3);
    expect(chance(36)).toBeGreaterThan(chance(35));
    const said = [chance(36), chance(35)].map((share) => `${(100 * share).toFixed(0)}%`);
    expect(found.sentence).toContain(
      `the first period at or past it is most likely month 36 (${said[0]}; month 35 ${said[1]})`,
    );
  });
});

describe("a culture that is past a density by the record's end", () => {
  const N = [10, 18, 31, 50, 69, 85, 93, 97, 99, 100];
  const record = observations(tableOf({ hour: N.map((_, i) => i), N }), {
    period: "hour",
    step: { every: 1, of: "hour" },
    value: "N",
  });
  const fitted = fit(recurrence("ΔN = r*N*(1 - N/K)"), record, { errors: "observation" });

  test("is answered for by the fitted time with its interval; the reading stands in a note", () => {
    const found = timeToReach(forecast(fitted, { periods: 4 }), { risesTo: 90 });
    const [group] = found.groups;
    expect(group!.withinRecord).toBe(true);
    expect(group!.recorded).toBe(6);
    expect(group!.time!).toBeGreaterThan(5);
    expect(group!.time!).toBeLessThan(6);
    expect(found.sentence).toMatch(
      /^N reaches 90 at hour 5\.\d+ \(95% interval 5\.\d+ to 5\.\d+\), within the record; the first period at or past it is hour 6, .* A recorded value of N is at or past the level already at hour 6\.$/,
    );
  });

  test("gets its further readings after the record, and past ones only where they are asked for", () => {
    const asked = { periods: 10, answer: { parameter: "r" }, paths: 400 } as const;
    const ahead = nextReading(fitted, asked);
    expect(ahead.choices.map(({ time }) => time)).toEqual([10, 11, 12, 13, 14, 15, 16, 17, 18, 19]);
    expect(ahead.choices.some(({ withinRecord }) => withinRecord)).toBe(false);
    const kept = nextReading(fitted, { ...asked, values: { from: 0, to: 9 } });
    expect(kept.recommended.withinRecord).toBe(true);
    expect(kept.sentence).toMatch(
      /Hour \d lies within the record, so only a sample that was kept can still be read\.$/,
    );
  });

  test("is told which readings come after the event, and recommended none of them", () => {
    const early = fit(
      recurrence("ΔN = r*N*(1 - N/K)", { fixed: { K: 100 } }),
      observations(tableOf({ hour: [0, 1, 2, 3, 4], N: [10, 14, 19, 27, 35] }), {
        period: "hour",
        step: { every: 1, of: "hour" },
        value: "N",
      }),
      { errors: "observation" },
    );
    const found = nextReading(early, { periods: 12, answer: { time: "N", risesTo: 95 }, paths: 400 });
    const event = timeToReach(forecast(early, { periods: 12 }), { risesTo: 95 }).groups[0]!.time!;
    expect(found.event).toBeCloseTo(event, 9);
    for (const { time, tooLate } of found.choices) expect(tooLate).toBe(time > event);
    expect(found.recommended.tooLate).toBe(false);
    expect(found.sentence).toMatch(
      /\d of the 12 times come after the event itself, expected at hour \d+\.\d+, and are too late for it\.$/,
    );
  });
});
