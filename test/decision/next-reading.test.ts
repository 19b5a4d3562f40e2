import { describe, expect, test } from "vitest";
import { nextReading } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";
import { cultureRecord } from "./harbour-records.js";

const growth = recurrence("N[t+1] = R*N");

function record(times: readonly number[], values: readonly number[]) {
  return observations(tableOf({ day: [...times], count: [...values] }), {
    period: "day",
    step: { every: 1, of: "day" },
    value: "count",
  });
}

describe("a straight line on the log scale", () => {
  const stream = randomStream(41);
  const times = Array.from({ length: 12 }, (_, t) => t);
  const values = times.map((t) => 20 * 1.1 ** t * Math.exp(0.05 * stream.normal()));
  const fitted = fit(growth, record(times, values), { errors: "observation", distribution: "lognormal" });
  const found = nextReading(fitted, { periods: 8, answer: { parameter: "R" }, paths: 2000 });
  /** Source: variance of a slope is s^2/Sxx; a further reading at t adds (t - mean)^2 n/(n + 1) to Sxx (any regression text). */
  const exact = (t: number): number => {
    const sxx = (12 * (12 ** 2 - 1)) / 12;
    return 1 - Math.sqrt(sxx / (sxx + ((t - 5.5) ** 2 * 12) / 13));
  };

  test("is known best from a reading at its far end", () => {
    expect(found.recommended.time).toBe(19);
    const past = nextReading(fitted, {
      periods: 1,
      values: { from: 0, to: 11 },
      answer: { parameter: "R" },
      paths: 2000,
    });
    expect([0, 11]).toContain(past.recommended.time);
  });

  test("narrows as the variance of a slope says, within the stated error", () => {
    // The draws are t with 10 degrees of freedom and sigma is held, which leaves 2%; 3.5 Monte-Carlo errors beside it.
    const kept = nextReading(fitted, {
      periods: 8,
      values: { from: 0, to: 19 },
      answer: { parameter: "R" },
      paths: 2000,
    });
    for (const time of [0, 5, 12, 15, 19]) {
      const choice = kept.choices.find((each) => each.time === time)!;
      expect(Math.abs(choice.gain - exact(time))).toBeLessThan(3.5 * choice.error + 0.025);
    }
  });

  test("keeps its promise on simulated follow-ups", () => {
    const before = fitted.groups[0]!.estimates[0]!.standardError! / fitted.groups[0]!.sigma;
    const after = Array.from({ length: 40 }, () => {
      const read = 20 * 1.1 ** 19 * Math.exp(0.05 * stream.normal());
      const [group] = fit(growth, record([...times, 19], [...values, read]), {
        errors: "observation",
        distribution: "lognormal",
      }).groups;
      return group!.estimates[0]!.standardError! / group!.sigma;
    });
    const ratio = after.reduce((sum, each) => sum + each, 0) / 40 / before;
    expect(Math.abs(1 - ratio - found.recommended.gain)).toBeLessThan(3.5 * found.recommended.error + 0.025);
  });

  test("needs more than one reading where they are cheap, and says so", () => {
    const two = nextReading(fitted, { periods: 8, answer: { parameter: "R" }, paths: 2000, replicates: 4 });
    expect(two.recommended.gain).toBeGreaterThan(found.recommended.gain);
    const dear = nextReading(fitted, {
      periods: 8,
      answer: { parameter: "R" },
      paths: 2000,
      cost: (time) => (time > 14 ? 10 : 1),
    });
    expect(dear.recommended.time).toBe(14);
    expect(found.sentence).toMatch(
      /^A reading of N at day 19 helps most of the 8 times looked at: it is expected to narrow the margin of R by [\d.]+% \(Monte-Carlo error [\d.]+%\), if the rule holds\.$/,
    );
  });
});

describe("a culture cut before its inflection", () => {
  const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)", {
    bounds: { R: [1, Infinity], K: [0, Infinity] },
  });
  const early = fit(sheltered, cultureRecord(9), { errors: "observation", distribution: "lognormal" });

  test("tells its capacity from a reading after the inflection", () => {
    // Source: the whole record has K 1.52 and N0 .0198 with r .544 an hour, so the inflection, at K/2, is at hour 7.9; before it
    // the capacity hardly shows (common practice).
    const found = nextReading(early, {
      periods: 32,
      answer: { parameter: "K" },
      values: { from: 4.5, to: 20 },
    });
    expect(found.recommended.time).toBeGreaterThan(7.9);
    expect(found.recommended.gain).toBeGreaterThan(0.5);
    expect(found.choices[0]!.gain).toBeLessThan(found.recommended.gain / 2);
  });

  test("and rival rules are told apart by a late reading", () => {
    const unbounded = fit(recurrence("N[t+1] = R*N"), cultureRecord(9), {
      errors: "observation",
      distribution: "lognormal",
    });
    const found = nextReading([early, unbounded], { periods: 24, values: { from: 4.5, to: 16 } });
    expect(found.purpose).toBe("tell the rules apart");
    expect(found.recommended.time).toBeGreaterThan(8);
    expect(found.recommended.telling!).toBeGreaterThan(0.5);
    expect(found.sentence).toMatch(
      /^A reading of N at hour \d+(\.5)? tells the 2 rules apart best of the 24 times looked at: /,
    );
  });
});

test("a reading without a purpose or a time is refused", () => {
  const fitted = fit(growth, record([0, 1, 2, 3, 4, 5, 6], [20, 22, 24.5, 26.5, 29, 32.3, 35.2]), {
    errors: "process",
    distribution: "lognormal",
  });
  expect(() => nextReading(fitted, { periods: 3 })).toThrow(
    "Give several rival fits to tell apart, or one fit and the `answer` to be narrowed.",
  );
  expect(() => nextReading(fitted, { periods: 3, answer: { parameter: "R" }, values: [2] })).toThrow(
    "No reading can be taken at the times asked for; the rules know times from day 6 to day 9, and with errors in the process only those after the record.",
  );
  expect(
    nextReading(fitted, { periods: 3, answer: { parameter: "R" } }).choices.map((each) => each.time),
  ).toEqual([7, 8, 9]);
});
