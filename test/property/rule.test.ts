import * as fc from "fast-check";
import { expect, test } from "vitest";
import { compileRule, encloseStep, interpretRule, recurrence, ruleText } from "../../src/rule/index.js";
import { expressionText, ruleSource, soup } from "./arbitraries/rule-text.js";

const seeded = { seed: 20260401, numRuns: 300 };
const positive = fc.double({ min: 0.1, max: 5, noNaN: true });
const anyNumber = fc.double({ min: -5, max: 5, noNaN: true });
/** N, P, N[t-1], P[t-1], P[t-2], whichever of them the rule keeps. */
const states = fc.array(anyNumber, { minLength: 5, maxLength: 5 });

test("reading a printed rule gives the same rule", () => {
  void fc.assert(
    fc.property(ruleSource(false), (text) => {
      const rule = recurrence(text, { inputs: ["u"] });
      const printed = ruleText(rule);
      const again = recurrence(printed, { inputs: ["u"] });
      expect(ruleText(again)).toBe(printed);
      const values = [rule, again].map((one) => {
        const next = new Float64Array(one.states.length + one.lags.length);
        const state = new Float64Array(next.length).fill(1.25);
        const parameters = new Float64Array(one.parameters.length).fill(0.75);
        compileRule(one).step(state, parameters, [Float64Array.of(1, 2, 3)], 1, next);
        return next;
      });
      expect(values[0]).toEqual(values[1]);
    }),
    seeded,
  );
});

test("generated code and interpreter give the same bits, values and sensitivities", () => {
  void fc.assert(
    fc.property(ruleSource(false), states, positive, positive, (text, start, r, K) => {
      const rule = recurrence(text, { inputs: ["u"] });
      const width = rule.states.length + rule.lags.length;
      const unknowns = rule.parameters.length + width;
      const parameters = Float64Array.from(rule.parameters, (name) => (name === "r" ? r : K));
      const initial = Float64Array.from(start.slice(0, width));
      const results = [compileRule(rule), interpretRule(rule)].map((compiled) => {
        const values = new Float64Array(5 * width);
        const table = new Float64Array(5 * width * unknowns);
        const plain = new Float64Array(5 * width);
        const inputs = [Float64Array.of(0.5, 1, 1.5, 2, 2.5, 3)];
        compiled.pathWithSensitivities(initial, parameters, inputs, 0, 4, values, table);
        compiled.path(initial, parameters, inputs, 0, 4, plain);
        expect(plain).toEqual(values);
        return { values, table };
      });
      // Zero may carry either sign; what a reader sees is the same.
      const unsigned = (list: Float64Array): readonly number[] => Array.from(list, (value) => value + 0);
      expect(unsigned(results[0]!.values)).toEqual(unsigned(results[1]!.values));
      const finite = results.every(({ values, table }) => [...values, ...table].every(Number.isFinite));
      if (finite) expect(unsigned(results[0]!.table)).toEqual(unsigned(results[1]!.table));
    }),
    seeded,
  );
});

test("many paths abreast take the same steps as each alone", () => {
  void fc.assert(
    fc.property(ruleSource(false), states, positive, positive, (text, start, r, K) => {
      const rule = recurrence(text, { inputs: ["u"] });
      const width = rule.states.length + rule.lags.length;
      const inputs = [Float64Array.of(0.5, 1, 1.5, 2)];
      const own = [1, 1.5, 0.5].map((k) =>
        Float64Array.from(rule.parameters, (name) => k * (name === "r" ? r : K)),
      );
      const states3 = own.map((_, k) => Float64Array.from(start.slice(0, width), (value) => value + 0.1 * k));
      const flat = (rows: readonly Float64Array[]): Float64Array =>
        Float64Array.from(rows.flatMap((row) => [...row]));
      for (const compiled of [compileRule(rule), interpretRule(rule)]) {
        const each = flat(states3);
        compiled.advanceEach(each, 0, 3, flat(own), inputs, 1);
        const shared = flat(states3);
        compiled.advance(shared, 1, 3, own[0]!, inputs, 1);
        const alone = (k: number, parameters: Float64Array): Float64Array => {
          const next = new Float64Array(width);
          compileRule(rule).step(states3[k]!, parameters, inputs, 1, next);
          return next;
        };
        expect(each).toEqual(flat([0, 1, 2].map((k) => alone(k, own[k]!))));
        expect(shared).toEqual(flat([states3[0]!, alone(1, own[0]!), alone(2, own[0]!)]));
      }
    }),
    seeded,
  );
});

test("paths of one state abreast take the same steps, finite or not", () => {
  const starts = fc.array(fc.oneof(anyNumber, fc.constantFrom(0, 1e200, -1e200, Number.NaN)), {
    minLength: 1,
    maxLength: 40,
  });
  void fc.assert(
    fc.property(expressionText(false), starts, (text, from) => {
      const one = text.replace(/P(\[t-2\])?|N\[t-1\]|\bu\b(\[t\+1\])?/gu, "N");
      const compiled = compileRule(recurrence(`N[t+1] = ${one} + 0*r*K + 0*N`));
      const parameters = Float64Array.of(0.75, 0.75);
      const present = Float64Array.from(from);
      compiled.advance(present, 0, from.length, parameters, [], 3);
      const alone = Float64Array.from(from, (value) => {
        const state = Float64Array.of(value);
        compiled.step(state, parameters, [], 3, state);
        return state[0]!;
      });
      expect(present).toEqual(alone);
    }),
    seeded,
  );
});

test("sensitivities agree with differences of paths", () => {
  let compared = 0;
  void fc.assert(
    fc.property(ruleSource(true), states, positive, positive, (text, start, r, K) => {
      const rule = recurrence(text, { inputs: ["u"] });
      const width = rule.states.length + rule.lags.length;
      const unknowns = rule.parameters.length + width;
      const at = [...rule.parameters.map((name) => (name === "r" ? r : K)), ...start.slice(0, width)];
      const inputs = [Float64Array.of(0.5, 1, 1.5, 2)];
      const run = (point: readonly number[], table?: Float64Array): Float64Array => {
        const values = new Float64Array(3 * width);
        const parameters = Float64Array.from(point.slice(0, rule.parameters.length));
        const initial = Float64Array.from(point.slice(rule.parameters.length));
        const compiled = compileRule(rule);
        if (table) compiled.pathWithSensitivities(initial, parameters, inputs, 0, 2, values, table);
        else compiled.path(initial, parameters, inputs, 0, 2, values);
        return values;
      };
      const table = new Float64Array(3 * width * unknowns);
      if (!run(at, table).every((value) => Math.abs(value) < 1e3)) return;
      const slope = (k: number, h: number): Float64Array => {
        const up = run(at.map((value, i) => (i === k ? value + h : value)));
        const down = run(at.map((value, i) => (i === k ? value - h : value)));
        return up.map((value, i) => (value - down[i]!) / (2 * h));
      };
      for (let k = 0; k < unknowns; k++) {
        const rough = slope(k, 1e-4);
        const fine = slope(k, 1e-5);
        fine.forEach((value, i) => {
          // Only where differences themselves have settled do they judge; they are good to about 1e-6.
          const settled = Math.abs(value - rough[i]!) <= 1e-5 * Math.max(1, Math.abs(value));
          const exact = table[i * unknowns + k]!;
          if (!settled || !Number.isFinite(exact)) return;
          compared++;
          expect(Math.abs(exact - value)).toBeLessThanOrEqual(1e-4 * Math.max(1, Math.abs(exact)));
        });
      }
    }),
    seeded,
  );
  expect(compared).toBeGreaterThan(1000);
});

test("any text is read or refused with a place inside it", () => {
  const either = fc.oneof(soup, fc.string({ unit: "grapheme", maxLength: 40 }), ruleSource(false));
  void fc.assert(
    fc.property(either, (text) => {
      try {
        recurrence(text);
      } catch (error) {
        const refusal = error as { name: string; facts: { text: string; start: number; end: number } };
        expect(refusal.name).toBe("ModelError");
        const { text: shown, start, end } = refusal.facts;
        expect(shown).toBe(text.normalize("NFC").replace(/\r\n?/gu, "\n"));
        expect(start).toBeGreaterThanOrEqual(0);
        expect(end).toBeGreaterThanOrEqual(start);
        expect(end).toBeLessThanOrEqual(shown.length);
      }
    }),
    { ...seeded, numRuns: 2000 },
  );
});

test("bounds over an interval hold the value at every point of it", () => {
  void fc.assert(
    fc.property(
      expressionText(false),
      anyNumber,
      positive,
      fc.double({ min: 0, max: 1, noNaN: true }),
      (text, low, width, part) => {
        const one = text.replace(/P(\[t-2\])?|N\[t-1\]|\bu\b(\[t\+1\])?|\bt\b/gu, "N");
        const rule = recurrence(`N[t+1] = ${one} + 0*r*K`);
        const parameters = new Float64Array(rule.parameters.length).fill(0.75);
        const { value } = encloseStep(rule, { parameters, inputs: new Float64Array(0) })([low, low + width]);
        const next = new Float64Array(1);
        compileRule(rule).step(Float64Array.of(low + part * width), parameters, [], 0, next);
        if (!Number.isFinite(next[0]!)) return;
        expect(value[0]).toBeLessThanOrEqual(next[0]!);
        expect(value[1]).toBeGreaterThanOrEqual(next[0]!);
      },
    ),
    { ...seeded, numRuns: 3000 },
  );
});
