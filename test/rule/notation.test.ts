import { expect, test } from "vitest";
import { eventOrder, nonsmoothCalls, recurrence, ruleTex } from "../../src/rule/index.js";

test("TeX is set as a paper would: fractions, subscripts, side-by-side products", () => {
  expect(ruleTex(recurrence("ΔN = r*N*(1 - N/K)"))).toBe(
    "\\Delta N_{t} = r\\,N_{t}\\,\\left(1 - \\frac{N_{t}}{K}\\right)",
  );
  expect(ruleTex(recurrence("N1[t+1] = lam*N1/(1 + (alpha*N1)^b)"))).toBe(
    "N_{1,t+1} = \\frac{\\lambda\\,N_{1,t}}{1 + \\left(\\alpha\\,N_{1,t}\\right)^{b}}",
  );
});

test("TeX of a fitted rule has the numbers in place of the parameters", () => {
  const rule = recurrence("owed[t+1] = a*owed + b");
  expect(ruleTex(rule, { a: "1.0035", b: -250 })).toBe(
    "\\mathrm{owed}_{t+1} = 1.0035\\,\\mathrm{owed}_{t} + \\left(-250\\right)",
  );
});

test("lags, inputs, conditions and functions have their usual signs", () => {
  const rule = recurrence("I[t+1] = I + q[t+1] - if(d > 0 and I >= d, d, floor(I[t-2]))", {
    inputs: ["q", "d"],
  });
  expect(ruleTex(rule)).toBe(
    "I_{t+1} = I_{t} + q_{t+1} - \\begin{cases} d_{t} & \\text{if } d_{t} > 0 \\text{ and } I_{t} \\ge d_{t} \\\\ \\left\\lfloor I_{t-2} \\right\\rfloor & \\text{otherwise} \\end{cases}",
  );
});

test("the order of events is the order of the lines", () => {
  const rule = recurrence("interest = i*owed\npaid = min(payment, owed + interest)\nΔowed = interest - paid");
  expect(eventOrder(rule)).toBe("interest, then paid, then owed at t+1");
});

test("kinks and jumps are listed where a fit could meet them", () => {
  const rule = recurrence("N[t+1] = max(N - c, 0) + floor(N) + mod(t, 12)");
  expect(nonsmoothCalls(rule)).toEqual({
    kinks: [{ function: "max", start: 9, end: 22 }],
    jumps: [{ function: "floor", start: 25, end: 33 }],
  });
});

test("sums of different units and periods of different lengths are found", () => {
  const rule = recurrence("N[t+1] = N + i*N + K", {
    units: { N: "10^4 cells/mL", K: "mL", i: "1/hour" },
  });
  expect(rule.findings.map(({ message }) => message)).toMatchInlineSnapshot(`
    [
      "N + i*N + K combines different units: N + i*N has the unit 10^4 cells/mL, K has the unit mL. Correct the units or the rule.",
    ]
  `);
  const dated = recurrence("owed[t+1] = owed*(1 + i) - p", { units: { i: "1/year", p: "EUR/month" } });
  expect(dated.findings.map(({ message }) => message)).toMatchInlineSnapshot(`
    [
      ""i" is per year and "p" per month, but a step is one period. Convert one of them by compounding.",
    ]
  `);
  const right = recurrence("ΔN = r*N*(1 - N/K)", { units: { N: "cells/mL", K: "cells/mL", r: "1/hour" } });
  expect(right.findings).toEqual([]);
});
