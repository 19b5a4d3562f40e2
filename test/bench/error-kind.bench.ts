// Held to: over 1,000 growth records of each kind of error (40 readings, errors of 10%), right in at least 75% and wrong
// in at most 10%; the rest is left open.
import { bench } from "vitest";
import { type FitOptions, fit } from "../../src/estimate/index.js";
import { errorAdvice } from "../../src/evidence/check/error-advice.js";
import { randomStream } from "../../src/numeric/index.js";
import { type Rule, recurrence } from "../../src/rule/index.js";
import { drawn } from "../evidence/drawn.js";
import { series } from "../evidence/series.js";

const each = 200;
const growing: readonly (readonly [Rule, readonly number[]])[] = [
  [recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)"), [1.15, 100]],
  [recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)"), [1.3, 100]],
  [recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)"), [1.8, 100]],
  [recurrence("ΔN = r*N*(1 - N/K)"), [0.4, 100]],
  [recurrence("N[t+1] = N*exp(r*(1 - N/K))"), [0.7, 100]],
];

for (const errors of ["process", "observation"] as const) {
  const stream = randomStream(20260401);
  const all = { right: 0, wrong: 0, records: 0 };
  for (const [rule, parameters] of growing) {
    const own = { right: 0, wrong: 0 };
    for (let k = 0; k < each; k++) {
      const kind = adviceOn(rule, drawn(rule, parameters, 5, 40, 0.1, errors, stream), k);
      if (kind === errors) own.right++;
      else if (kind !== "undecided") own.wrong++;
    }
    all.right += own.right;
    all.wrong += own.wrong;
    all.records += each;
    console.log(
      `  ${rule.text} at ${parameters.join(", ")}: right ${own.right}, wrong ${own.wrong} of ${each}`,
    );
  }
  const percent = (count: number): string => `${((100 * count) / all.records).toFixed(1)}%`;
  console.log(
    `kind of error, ${all.records} records with errors in the ${errors}: right ${percent(all.right)} (held to 75%), ` +
      `wrong ${percent(all.wrong)} (held to 10%)`,
  );
}

function adviceOn(rule: Rule, values: Float64Array, seed: number): string {
  const options: FitOptions = { errors: "observation", distribution: "lognormal", intervals: "none" };
  const fitted = fit(rule, series(values), options);
  return errorAdvice(fitted, fitted.groups[0]!, 60, randomStream(seed))?.kind ?? "undecided";
}

const [rule, parameters] = growing[1]!;
const one = drawn(rule, parameters, 5, 40, 0.1, "process", randomStream(1));
bench("advice on the kind of error in one record of 40 readings", () => {
  adviceOn(rule, one, 1);
});
