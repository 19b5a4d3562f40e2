// The same question through every function that can be asked gets the same answer, over rules, noises, bounds and levels.
import fc from "fast-check";
import { expect, test } from "vitest";
import {
  type Measure,
  optimize,
  sensitivity,
  solveFor,
  timeToReach,
  tradeoff,
} from "../../src/decision/index.js";
import { type Noise, simulate } from "../../src/projection/index.js";
import { type Rule, recurrence } from "../../src/rule/index.js";

const seeded = { seed: 20260404, numRuns: 25 } as const;

/** Rules with one parameter p that raises the state, beginning at 20; `top` is a level that they may pass. */
const texts: readonly (readonly [text: string, at: number])[] = [
  ["x[t+1] = x + p", -1.2],
  ["x[t+1] = x*exp(p)", -0.15],
  ["x[t+1] = max(0, x - 2 + p)", 0.5],
  ["x[t+1] = x + p*x*(1 - x/50)", 0.3],
  ["served = min(x, 3)\nx[t+1] = x - served + p", 1.5],
  ["x[t+1] = if(x > 15, x + p, x - 1)", -0.5],
];

const rules = fc
  .tuple(fc.constantFrom(...texts), fc.constantFrom("none", "absorbed", "error"))
  .map(([[text, at], bound]): { readonly rule: Rule; readonly at: number } => ({
    rule: recurrence(text, {
      ...(bound !== "none" && {
        bounds: { x: { range: [0, Number.POSITIVE_INFINITY] as const, atBounds: bound as "absorbed" } },
      }),
    }),
    at,
  }));

const noises: fc.Arbitrary<Noise> = fc.oneof(
  fc.record({
    distribution: fc.constant("normal" as const),
    sd: fc.double({ min: 0.5, max: 4, noNaN: true }),
  }),
  fc.record({
    distribution: fc.constant("lognormal" as const),
    sd: fc.double({ min: 0.05, max: 0.3, noNaN: true }),
  }),
  fc.constant({ distribution: "poisson" as const }),
  fc.record({
    distribution: fc.constant("negative-binomial" as const),
    size: fc.integer({ min: 2, max: 9 }),
  }),
);

const levels = fc.oneof(
  fc.constantFrom(0, 5, 12, 20).map((fallsTo) => ({ fallsTo })),
  fc.constantFrom(20, 25, 35).map((risesTo) => ({ risesTo })),
);

const given = { initial: { x: 20 }, periods: 12, paths: 400 } as const;

test("a probability and a median time are the same in a simulation, a table of choices and a search", () => {
  fc.assert(
    fc.property(
      rules,
      noises,
      levels,
      fc.integer({ min: 1, max: 99 }),
      ({ rule, at }, noise, level, seed) => {
        const asked = { ...given, parameters: { p: at }, noise: { x: noise }, seed };
        const { never, median, left, beginsPast } = timeToReach(simulate(rule, asked), level).groups[0]!;
        const probability = { probability: "x", ...level } as Measure;
        const time = { time: "x", ...level } as Measure;
        const [row] = tradeoff(rule, {
          ...asked,
          vary: "p",
          values: [at],
          answers: { probability, time },
        }).rows;
        expect(row!.answers["probability"]).toBeCloseTo(1 - never, 12);
        expect(row!.errors["probability"]).toBeCloseTo(Math.sqrt((never * (1 - never)) / 400), 12);
        expect(row!.answers["time"]).toBe(beginsPast ? 0 : (median ?? Number.POSITIVE_INFINITY));
        expect(row!.left).toBeCloseTo(left, 12);
        expect(sensitivity(rule, { ...asked, answer: probability }).answer).toBe(row!.answers["probability"]);
        // Another seed gives the same within the error of both.
        const other = timeToReach(simulate(rule, { ...asked, seed: seed + 100 }), level).groups[0]!;
        const error = Math.sqrt((0.25 + never * (1 - never)) / 400);
        expect(Math.abs(other.never - never)).toBeLessThan(4.5 * error);
      },
    ),
    seeded,
  );
}, 60_000);

const measures: fc.Arbitrary<Measure> = fc.constantFrom(
  { level: "x", at: 6 },
  { average: "x" },
  { total: "x", from: 2, to: 5 },
  { lowest: "x" },
  { highest: "x", to: 8 },
  { level: "x", at: 6, quantile: 0.8 },
  { share: "x", risesTo: 18 },
);

test("a setting that is solved for, or best, brings what a table of choices says of it", () => {
  fc.assert(
    fc.property(rules, noises, measures, ({ rule, at }, noise, measure) => {
      const asked = { ...given, paths: 200, parameters: { p: at }, noise: { x: noise } };
      const answerAt = (value: number): number =>
        tradeoff(rule, { ...asked, vary: "p", values: [value], answers: { measure } }).rows[0]!.answers[
          "measure"
        ]!;
      const aim = answerAt(at);
      if (!Number.isFinite(aim)) return;
      const range = [at - 0.5, at + 0.5] as const;
      const solved = solveFor(rule, {
        ...asked,
        vary: "p",
        range,
        until: { ...measure, atLeast: aim } as never,
      });
      for (const { value, achieved, meets } of solved.solutions) {
        expect(achieved).toBe(answerAt(value));
        expect(achieved).toBeGreaterThanOrEqual(aim);
        expect(meets).toMatch(/above|below/);
      }
      const best = optimize(rule, { ...asked, vary: "p", range, maximize: measure });
      expect(best.achieved).toBe(answerAt(best.value));
      expect(best.achieved).toBeGreaterThanOrEqual(aim - 4.5 * (best.achievedError + 1e-9));
    }),
    { ...seeded, numRuns: 12 },
  );
}, 120_000);

test("chance of size 0 is no chance", () => {
  const none = fc.constantFrom(
    { distribution: "normal", sd: 0 } as const,
    { distribution: "lognormal", sd: 0 } as const,
  );
  const all = fc.oneof(
    measures,
    levels.map((level) => ({ time: "x", ...level }) as Measure),
  );
  fc.assert(
    fc.property(rules, none, all, ({ rule, at }, noise, measure) => {
      const asked = { ...given, paths: 7, parameters: { p: at } };
      const answer = (options: object): number =>
        tradeoff(rule, { ...asked, ...options, vary: "p", values: [at], answers: { measure } }).rows[0]!
          .answers["measure"]!;
      const [still, moved] = [answer({}), answer({ noise: { x: noise } })];
      if (Number.isFinite(still)) expect(Math.abs(moved - still)).toBeLessThan(0.05);
      else expect(moved).toBe(still);
      // Levels and sums to rounding; between two periods a path without chance has a curve, and else a straight line.
      if (!("time" in measure) && Number.isFinite(still)) expect(moved).toBeCloseTo(still, 9);
    }),
    seeded,
  );
});

test("a bound that absorbs changes no probability and no time of a level down to it", () => {
  fc.assert(
    fc.property(
      fc.constantFrom(...texts.slice(0, 2)),
      noises,
      fc.constantFrom(0, 5, 12),
      ([text, p], noise, fallsTo) => {
        const asked = { ...given, parameters: { p: 3 * p }, noise: { x: noise } };
        const [free, bound, error] = (["free", "absorbed", "error"] as const).map((kind) => {
          const bounds = {
            x: { range: [0, Number.POSITIVE_INFINITY] as const, atBounds: kind as "absorbed" },
          };
          const rule = recurrence(text, kind === "free" ? {} : { bounds });
          const { never, median, lower, upper } = timeToReach(simulate(rule, asked), { fallsTo }).groups[0]!;
          return { never, median, lower, upper };
        });
        expect(bound).toEqual(free);
        expect(error).toEqual(free);
      },
    ),
    seeded,
  );
});
