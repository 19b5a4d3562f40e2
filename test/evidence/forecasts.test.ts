import { expect, test } from "vitest";
import { fit } from "../../src/estimate/index.js";
import { predictAhead } from "../../src/evidence/forecasts/predict-ahead.js";
import { randomStream } from "../../src/numeric/index.js";
import { compileRule, recurrence } from "../../src/rule/index.js";
import { drawn } from "./drawn.js";
import { series } from "./series.js";

// Source: closed form of a log-linear record, sd_h = s sqrt(h + h^2/n), for g = .03, s = .06, n = 24 increments; printed
// to 6 decimals.
test("predictive sd includes parameter uncertainty and process error of every step (closed form)", () => {
  const away = 0.06 * Math.sqrt(23 / 24);
  const logs = [0];
  for (let t = 1; t <= 24; t++) logs.push(logs[t - 1]! + 0.03 + (t % 2 === 0 ? away : -away));
  const record = series(logs.map(Math.exp));
  const fitted = fit(recurrence("N[t+1] = R*N"), record, { errors: "process", distribution: "lognormal" });
  const ahead = predictAhead(fitted, fitted.groups[0]!, record.groups[0]!, 24, 12)!;
  for (const [h, expected] of [
    [1, 0.061237],
    [6, 0.164317],
    [12, 0.254558],
  ] as const)
    expect(Math.abs(ahead[h - 1]![0]!.deviation - expected)).toBeLessThan(5e-7);
});

// Source: simulation of the fitted rule at its estimates; 20,000 paths give the deviation to half a percent, and the
// slopes of the rule bend it by a few percent over 4 steps.
test("errors of steps are carried along a rule that bends", () => {
  const rule = recurrence("N[t+1] = N*exp(r*(1 - N/K))");
  const record = series(drawn(rule, [0.6, 100], 10, 200, 0.05, "process", randomStream(4)));
  const fitted = fit(rule, record, { errors: "process", distribution: "lognormal" });
  const [group] = fitted.groups;
  const ahead = predictAhead(fitted, group!, record.groups[0]!, record.groups[0]!.index.length - 1, 4)!;
  const { step } = compileRule(rule);
  const parameters = Float64Array.from(rule.parameters, (name) => group!.parameters[name]!);
  const stream = randomStream(9);
  const last = record.groups[0]!.values["N"]!.at(-1)!;
  const ends = Array.from({ length: 20_000 }, () => {
    const state = Float64Array.of(last);
    for (let t = 0; t < 4; t++) {
      step(state, parameters, [], t, state);
      state[0] = state[0]! * Math.exp(group!.sigma * stream.normal());
    }
    return Math.log(state[0]!);
  });
  const mean = ends.reduce((sum, end) => sum + end, 0) / ends.length;
  const deviation = Math.sqrt(ends.reduce((sum, end) => sum + (end - mean) ** 2, 0) / ends.length);
  expect(Math.abs(ahead[3]![0]!.deviation / deviation - 1)).toBeLessThan(0.05);
  expect(Math.abs(ahead[3]![0]!.mean - mean)).toBeLessThan(0.01);
});
