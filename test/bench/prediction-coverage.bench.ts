// Held to: over 5,000 simulated records a design, the 80% and 95% bands of a future observation hold it in 80% and 95% of
// records, within 3 points, 1 and 5 periods ahead. Runs fewer by default: set PERIODWISE_BENCH_RECORDS=5000 for the full count.
import { bench } from "vitest";
import { type FitOptions, fit } from "../../src/estimate/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { forecast } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { compileRule, type Rule, recurrence } from "../../src/rule/index.js";

interface Design {
  readonly name: string;
  readonly rule: Rule;
  readonly parameters: readonly number[];
  readonly first: number;
  readonly count: number;
  readonly sd: number;
  readonly options: FitOptions;
}

const bounded = { bounds: { R: [1, Infinity], K: [0, Infinity] } } as const;
const designs: readonly Design[] = [
  {
    name: "affine, errors in the process",
    rule: recurrence("x[t+1] = a*x + b"),
    parameters: [0.7, 30],
    first: 60,
    count: 30,
    sd: 4,
    options: { errors: "process" },
  },
  {
    name: "growth, proportional errors in the process",
    rule: recurrence("x[t+1] = R*x"),
    parameters: [1.05],
    first: 20,
    count: 20,
    sd: 0.1,
    options: { errors: "process", distribution: "lognormal" },
  },
  {
    name: "Beverton-Holt, proportional errors of reading",
    rule: recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)", bounded),
    parameters: [1.5, 100],
    first: 5,
    count: 20,
    sd: 0.08,
    options: { errors: "observation", distribution: "lognormal" },
  },
  {
    name: "Ricker, proportional errors in the process",
    rule: recurrence("N[t+1] = N*exp(r*(1 - N/K))"),
    parameters: [0.8, 100],
    first: 40,
    count: 30,
    sd: 0.2,
    options: { errors: "process", distribution: "lognormal" },
  },
  {
    name: "decay, parameter errors of reading",
    rule: recurrence("x[t+1] = a*x"),
    parameters: [0.9],
    first: 100,
    count: 15,
    sd: 3,
    options: { errors: "observation" },
  },
];

const ahead = 5;

/** A record of a design and what follows it, as it will be read. */
function drawn(design: Design, seed: number): readonly number[] {
  const { rule, parameters, first, count, sd, options } = design;
  const { step } = compileRule(rule);
  const stream = randomStream(seed);
  const state = Float64Array.of(first);
  const given = Float64Array.from(parameters);
  const log = options.distribution === "lognormal";
  const erring = (value: number): number =>
    log ? value * Math.exp(sd * stream.normal()) : value + sd * stream.normal();
  const process = options.errors === "process";
  const values = [process ? first : erring(first)];
  for (let t = 1; t < count + ahead; t++) {
    step(state, given, [], t - 1, state);
    if (process) state[0] = erring(state[0]!);
    values.push(process ? state[0]! : erring(state[0]!));
  }
  return values;
}

const records = Number(process.env["PERIODWISE_BENCH_RECORDS"] ?? 300);
for (const design of designs) {
  const inside = new Map([0.8, 0.95].flatMap((level) => [1, ahead].map((h) => [`${level} at ${h}`, 0])));
  let kept = 0;
  for (let k = 0; k < records; k++) {
    const values = drawn(design, 1 + k);
    const seen = values.slice(0, design.count);
    const record = observations(tableOf({ t: seen.map((_, t) => t), x: seen }), {
      period: "t",
      step: { every: 1, of: "period" },
      value: "x",
    });
    const fitted = fit(design.rule, record, { ...design.options, intervals: "none" });
    const [group] = forecast(fitted, { periods: ahead, paths: 600, seed: k, levels: [0.8, 0.95] }).groups;
    const end = group!.index.indexOf(group!.recordEnd);
    kept++;
    for (const band of group!.states[0]!.bands) {
      if (band.kind !== "future observation") continue;
      for (const h of [1, ahead]) {
        const value = values[design.count - 1 + h]!;
        const key = `${band.level} at ${h}`;
        if (value >= band.lower[end + h]! && value <= band.upper[end + h]!)
          inside.set(key, inside.get(key)! + 1);
      }
    }
  }
  const told = [...inside].map(([key, count]) => `${key}: ${((100 * count) / kept).toFixed(1)}%`);
  console.log(`  ${design.name}, ${kept} records: ${told.join(", ")}`);
}

bench("one forecast of 600 paths", () => {
  const values = drawn(designs[0]!, 1).slice(0, 30);
  const record = observations(tableOf({ t: values.map((_, t) => t), x: [...values] }), {
    period: "t",
    step: { every: 1, of: "period" },
    value: "x",
  });
  forecast(fit(designs[0]!.rule, record, { errors: "process", intervals: "none" }), {
    periods: ahead,
    paths: 600,
  });
});
