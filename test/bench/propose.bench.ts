// Held to: over 1,000 records of 30 readings from each of six catalogue rules, with errors of 10% (half of them in the
// process, half in the observation), the true rule or one that contains it is called supported in at least 90%; over
// 1,000 records of pure noise none is called adequate in at least 90%; under 0.2 s a record.
// PERIODWISE_BENCH_RECORDS sets how many records of each; the full count takes a quarter of an hour.
import { bench } from "vitest";
import { propose } from "../../src/evidence/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { type Rule, rules } from "../../src/rule/index.js";
import { drawn } from "../evidence/drawn.js";
import { series } from "../evidence/series.js";

const records = Number(process.env["PERIODWISE_BENCH_RECORDS"] ?? 60);
const shaped = ["hassell", "maynardSmithSlatkin"];
const crowded = [
  "logistic",
  "bevertonHolt",
  "ricker",
  "gompertz",
  "delayedDensity",
  "thetaLogistic",
  ...shaped,
];
/** Name, rule, parameters, first value, and the rules of which it is a special case or a limit. */
const truths: readonly (readonly [string, Rule, readonly number[], number, readonly string[]])[] = [
  ["geometric", rules.geometric(), [1.08], 10, ["affine", ...crowded]],
  ["affine", rules.affine(), [0.8, 20], 10, []],
  ["logistic", rules.logistic(), [0.5, 100], 8, []],
  ["bevertonHolt", rules.bevertonHolt(), [1.5, 100], 8, shaped],
  ["ricker", rules.ricker(), [0.5, 100], 8, ["thetaLogistic", "hassell"]],
  ["gompertz", rules.gompertz(), [0.2 * Math.log(100), 0.8], 8, []],
];

const share = (count: number, of = records): string => `${((100 * count) / of).toFixed(1)}%`;
let milliseconds = 0;
let done = 0;

/** The names that a record's proposal calls supported. */
function supportedIn(values: ArrayLike<number>): readonly string[] {
  const record = series(values);
  const before = process.cpuUsage().user;
  const { verdict } = propose(record, { distribution: "lognormal" });
  milliseconds += (process.cpuUsage().user - before) / 1000;
  done++;
  return verdict.rules;
}

for (const [name, rule, parameters, first, containing] of truths) {
  const stream = randomStream(20260401);
  const count = { exact: 0, alike: 0, called: 0 };
  for (let k = 0; k < records; k++) {
    const errors = k % 2 === 0 ? "process" : "observation";
    const supported = supportedIn(drawn(rule, parameters, first, 30, 0.1, errors, stream));
    count.called += supported.length;
    if (supported.includes(name)) count.exact++;
    if (supported.some((each) => each === name || containing.includes(each))) count.alike++;
  }
  console.log(
    `  ${name}: called supported in ${share(count.exact)}, it or a rule that contains it in ${share(count.alike)} ` +
      `(held to 90%); ${(count.called / records).toFixed(1)} rules called on average`,
  );
}
const stream = randomStream(7);
let none = 0;
for (let k = 0; k < records; k++)
  if (
    supportedIn(Float64Array.from({ length: 30 }, () => 100 * Math.exp(0.1 * stream.normal()))).length === 0
  )
    none++;
console.log(`  pure noise: none adequate in ${share(none)} (held to 90%)`);
console.log(`  ${(milliseconds / done).toFixed(0)} ms of processor time a record (held to 200)`);

const one = series(drawn(rules.ricker(), [0.5, 100], 8, 30, 0.1, "observation", randomStream(1)));
bench("propose rules for one record of 30 readings", () => {
  propose(one, { distribution: "lognormal" });
});
