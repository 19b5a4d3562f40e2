import { expect, test } from "vitest";
import { compileRule, interpretRule, recurrence, ruleText } from "../../src/rule/index.js";

test("a rule names its states and parameters in order of appearance", () => {
  const rule = recurrence("ΔN = r*N*(1 - N/K)");
  expect(rule.states).toEqual(["N"]);
  expect(rule.parameters).toEqual(["r", "K"]);
  expect(rule.form).toBe("change");
  expect(ruleText(rule)).toBe("ΔN = r*N*(1 - N/K)");
});

test.each(["ΔN = r*N*(1 - N/K)", "\u2206N = r*N*(1 - N/K)", "change(N) = r*N*(1 - N/K)"])(
  "%s is the change form",
  (text) => {
    expect(ruleText(recurrence(text))).toBe("ΔN = r*N*(1 - N/K)");
  },
);

test("generated code and interpreter give the same path and sensitivities", () => {
  const rule = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
  const values = [compileRule(rule), interpretRule(rule)].map((compiled) => {
    const v = new Float64Array(41);
    const s = new Float64Array(41 * 3);
    compiled.pathWithSensitivities(Float64Array.of(10), Float64Array.of(1.5, 1000), [], 0, 40, v, s);
    return [...v, ...s];
  });
  expect(values[0]).toEqual(values[1]);
});
