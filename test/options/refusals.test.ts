// Calls that once were answered with confidence, or with an error of JavaScript. Whole messages.
import { describe, expect, test } from "vitest";
import * as periodwise from "../../kernel-helpers/index.js";

const {
  attractor,
  bifurcations,
  bootstrap,
  changePoint,
  check,
  compare,
  densityDependence,
  equilibria,
  estimates,
  fit,
  forecast,
  gridInterval,
  lyapunovExponent,
  observations,
  recurrence,
  rules,
  simulate,
  solveFor,
  table,
  timeToReach,
  trajectory,
} =
  // As plain JavaScript sees them: without types.
  periodwise as unknown as Readonly<Record<string, (...given: readonly unknown[]) => never>> & {
    readonly rules: Readonly<Record<string, (...given: readonly unknown[]) => never>>;
  };

const hours = observations!(
  { hour: [0, 1, 2, 3, 4, 5, 6, 7, 8, 9], N: [10, 18, 31, 50, 69, 85, 93, 97, 99, 100] },
  { period: "hour", step: "hour", value: "N" },
);
const logistic = recurrence!("ΔN = r*N*(1 - N/K)");
const growth = recurrence!("N[t+1] = R*N");
const fitted = fit!(logistic, hours, { errors: "observation" }) as periodwise.Fit;
const stepwise = fit!(logistic, hours, { errors: "process" }) as periodwise.Fit;
const rival = fit!(rules["bevertonHolt"]!(), hours, { errors: "observation" }) as periodwise.Fit;
const run = simulate!(growth, { parameters: { R: 1.5 }, initial: { N: 10 }, periods: 20 });
const logisticRun = { parameters: { r: 0.5, K: 100 }, initial: { N: 10 }, periods: 3 };

/** What was said when a call was refused. */
function said(act: () => unknown): string {
  try {
    act();
  } catch (error) {
    const { name, message } = error as Error;
    return name === "ModelError" ? message : `${name}: ${message}`;
  }
  return "nothing was refused";
}

describe("a level is a share, wherever it is asked for", () => {
  const chaotic = recurrence!("x[t+1] = 3.9*x*(1 - x)");
  test.each([
    ["fit", () => fit!(logistic, hours, { errors: "observation", level: 95 })],
    ["bootstrap", () => bootstrap!(fitted, { resamples: 50, level: 95 })],
    ["lyapunovExponent", () => lyapunovExponent!(chaotic, { initial: { x: 0.3 }, periods: 3000, level: 95 })],
    ["changePoint", () => changePoint!(logistic, hours, { level: 95 })],
    ["gridInterval", () => gridInterval!(stepwise, "r", { resamples: 20, level: 95 })],
    ["compare", () => compare!([fitted, rival], { level: 95 })],
    ["densityDependence", () => densityDependence!(hours, { level: 95 })],
    ["timeToReach", () => timeToReach!(run, { risesTo: 100, level: 95 })],
  ])("%s", (_, act) => {
    expect(said(act)).toBe("Option `level` must be between 0 and 1; 95 was given. Write `level: 0.95`.");
  });

  test("a significance level is turned into one", () => {
    expect(said(() => densityDependence!(hours, { alpha: 0.05 }))).toContain("Write `level: 0.95`.");
  });
});

describe("an unknown option", () => {
  test.each([
    [
      () => fit!(logistic, hours, { errors: "observation", spred: "proportional" }),
      "distribution",
      '"lognormal"',
    ],
    [() => fit!(logistic, hours, { errors: "observation", spread: "constant" }), "distribution", '"normal"'],
    [() => forecast!(fitted, { periods: 3, level: 0.9 }), "levels", "[0.9]"],
    [() => forecast!(fitted, { horizon: 5 }), "periods", "5"],
    [
      () => simulate!(logistic, { ...logisticRun, nosie: { N: { distribution: "normal", sd: 3 } } }),
      "noise",
      '{ N: { distribution: "normal", sd: 3 } }',
    ],
    [
      () => simulate!(growth, { constants: { R: 2 }, initial: { N: 1 }, periods: 3 }),
      "parameters",
      "{ R: 2 }",
    ],
    [() => bootstrap!(fitted, { refits: 99 }), "resamples", "99"],
    [() => attractor!(logistic, { setting: "r", values: [1], initial: 10 }), "vary", '"r"'],
    [
      () => solveFor!(fitted, { unknown: "r", until: { level: "N", at: 3, is: 50 }, periods: 3 }),
      "vary",
      '"r"',
    ],
    [() => rules["perishable"]!({ shelfLife: 5 }), "life", "5"],
  ])("%#: the nearest name, with the value it would have", (act, name, value) => {
    const message = said(act);
    expect(message).toMatch(/^Unknown option `/);
    expect(message).toMatch(new RegExp(`Did you mean [^?]*\`${name}\``));
    expect(message).toContain(`Write \`${name}: ${value}\`.`);
  });

  test("inside an option, and the choices once", () => {
    const act = (noise: object): string =>
      said(() => simulate!(logistic, { ...logisticRun, noise: { N: noise } }));
    expect(act({ kind: "gaussian", sd: 3 })).toMatchInlineSnapshot(
      `"Unknown field \`kind\` in option \`noise.N\`. Did you mean \`distribution\`? Write \`noise: { N: { sd: 3, distribution: "normal" } }\`. \`noise.N\` takes \`distribution\`, \`sd\`, \`centre\`, \`size\` and \`variance\`."`,
    );
    expect(act({ distribution: "gaussian", sd: 3 })).toMatchInlineSnapshot(
      `"Option \`noise.N.distribution\` must be "normal", "lognormal", "poisson", "negative-binomial" or "demographic"; "gaussian" was given. Write \`noise: { N: { distribution: "normal", sd: 3 } }\`."`,
    );
    expect(act({ distribution: "normal" })).toMatchInlineSnapshot(
      `"Option \`noise.N\` lacks \`sd\`, a number of at least 0 or the name of a parameter. Write \`noise: { N: { distribution: "normal", sd: 0.1 } }\`."`,
    );
    expect(act({ distribution: "normal", sd: -3 })).toMatchInlineSnapshot(
      `"Option \`noise.N.sd\` must be a number of at least 0; -3 was given. Write \`noise: { N: { distribution: "normal", sd: 3 } }\`."`,
    );
    const plan = { inputs: { C: { usal: 3 } } };
    const fished = rules["schaefer"]!({ inputs: ["C"] });
    expect(
      said(() => simulate!(fished, { parameters: { r: 1, K: 9 }, initial: { B: 5 }, periods: 3, ...plan })),
    ).toMatchInlineSnapshot(
      `"Unknown field \`usal\` in option \`inputs.C\`. Did you mean \`usual\`? Write \`inputs: { C: { usual: 3 } }\`. \`inputs.C\` takes \`usual\`, \`from\` and \`at\`."`,
    );
  });

  test("of a measure", () => {
    const until = (target: object): string =>
      said(() => solveFor!(fitted, { vary: "r", until: target, periods: 3 }));
    expect(until({ risk: "N", fallsTo: 0, atMost: 0.1 })).toContain("Did you mean `probability`?");
    expect(until({ level: "N", at: 3 })).toMatchInlineSnapshot(
      `"Option \`until\` lacks \`is\`, \`atMost\` or \`atLeast\`. Write \`until: { level: "N", at: 3, is: 1 }\`."`,
    );
    expect(until({ time: "N", is: 3 })).toMatchInlineSnapshot(
      `"Option \`until\` lacks \`risesTo\` or \`fallsTo\`. Write \`until: { time: "N", is: 3, risesTo: 1 }\`."`,
    );
    expect(until({ level: "N", time: "N", at: 3, is: 3 })).toMatchInlineSnapshot(
      `"\`level\` and \`time\` in option \`until\` were both given. Give one of them."`,
    );
    expect(said(() => timeToReach!(run, { value: 100, direction: "up" }))).toMatchInlineSnapshot(
      `"Unknown option \`value\`. Did you mean \`risesTo\` or \`fallsTo\`? Write \`risesTo: 100\`. \`timeToReach\` takes \`state\`, \`risesTo\`, \`fallsTo\`, \`level\` and \`newUnit\`."`,
    );
    expect(said(() => timeToReach!(run, {}))).toMatchInlineSnapshot(
      `"\`timeToReach\` needs one of the options \`risesTo\` or \`fallsTo\`. Write \`risesTo: 1\`."`,
    );
    expect(said(() => timeToReach!(run, { risesTo: 1, fallsTo: 2 }))).toMatchInlineSnapshot(
      `"\`risesTo\` and \`fallsTo\` were both given. Give one of them."`,
    );
  });
});

test("a wrong first argument, with what to call first", () => {
  expect(said(() => timeToReach!(fitted, { risesTo: 100 }))).toMatchInlineSnapshot(
    `"\`timeToReach\` needs a forecast or a simulation, not a fit. Call \`forecast(fit, { periods: 12 })\` first: \`timeToReach(forecast(fit, { periods: 24 }), { risesTo: 120 })\`."`,
  );
  expect(said(() => timeToReach!(growth, { risesTo: 100 }))).toMatchInlineSnapshot(
    `"\`timeToReach\` needs a forecast or a simulation, not a rule. Call \`simulate(rule, { parameters, initial, periods: 12 })\` first: \`timeToReach(forecast(fit, { periods: 24 }), { risesTo: 120 })\`."`,
  );
  expect(said(() => check!(logistic))).toMatchInlineSnapshot(
    `"\`check\` needs a fit, not a rule. Call \`fit(rule, observations, { errors: "observation" })\` first: \`check(fit, { resamples: 200 })\`."`,
  );
  expect(said(() => fit!(hours, logistic, { errors: "process" }))).toMatchInlineSnapshot(
    `"\`fit\` needs a rule as its first argument, not observations. Give the arguments in this order: \`fit(rule, observations, { errors: "observation" })\`."`,
  );
  expect(said(() => fit!(rules["logistic"], hours, { errors: "process" }))).toMatchInlineSnapshot(
    `"\`fit\` needs a rule as its first argument, not a function. Call it for its rule, as in \`rules.logistic()\`: \`fit(rule, observations, { errors: "observation" })\`."`,
  );
  expect(said(() => fit!(logistic, { hour: [1], N: [2] }, { errors: "process" }))).toMatchInlineSnapshot(
    `"\`fit\` needs observations as its second argument, not { hour: [1], N: [2] }. Call \`observations(record, { period: "month", step: "month", value: "owed" })\` first: \`fit(rule, observations, { errors: "observation" })\`."`,
  );
  expect(said(() => observations!(Promise.resolve([]), { period: "hour" }))).toMatchInlineSnapshot(
    `"\`observations\` needs a record (a DataFrame, rows as objects, or columns by name), not a promise. Put \`await\` before it: \`observations(record, { period: "month", step: "month", value: "owed" })\`."`,
  );
  expect(said(() => compare!(logistic, fitted))).toMatchInlineSnapshot(
    `"\`compare\` needs fits, not a rule. Call \`fit(rule, observations, { errors: "observation" })\` for each rule first: \`compare([first, second], { periods: 4 })\`."`,
  );
  expect(said(() => gridInterval!(stepwise, "r", { group: "nope" }))).toMatchInlineSnapshot(
    `"Option \`group\`: the fit has no group "nope". It has a single group without a name: leave \`group\` out."`,
  );
  expect(said(() => table!([{ a: 1 }]))).toMatchInlineSnapshot(
    `"The options of \`table\` are an object; [{ a: 1 }] was given. Write \`table({ title: "Levels", columns: [{ key: "n", label: "Week", kind: "integer" }], rows: [{ n: 1 }] })\`."`,
  );
  expect(said(() => forecast!(fitted, 12))).toMatchInlineSnapshot(
    `"The options of \`forecast\` are an object; 12 was given. Write \`forecast(fit, { periods: 12 })\`."`,
  );
  expect(said(() => estimates!(fitted, { level: 0.9 }))).toMatchInlineSnapshot(
    `"\`estimates\` takes no options; { level: 0.9 } was given as well. Write \`estimates(fit)\`."`,
  );
});

test("a size that no memory holds, with the size it would need", () => {
  expect(said(() => forecast!(fitted, { periods: 1e9 }))).toMatchInlineSnapshot(
    `"Option \`periods\` is too large: 1000000000 would need about 144 GB of memory, and a call may use 1 GB. Write \`periods: 6000000\` or less."`,
  );
  expect(said(() => simulate!(logistic, { ...logisticRun, paths: 1e9 }))).toMatchInlineSnapshot(
    `"Option \`paths\` is too large: 1000000000 would need about 80 GB of memory, and a call may use 1 GB. Write \`paths: 10000000\` or less."`,
  );
  expect(said(() => bootstrap!(fitted, { resamples: 1e9 }))).toMatchInlineSnapshot(
    `"Option \`resamples\` is too large: 1000000000 would need about 96 GB of memory, and a call may use 1 GB. Write \`resamples: 10000000\` or less."`,
  );
});

describe("what is plain is taken", () => {
  test("fits one after the other, and with options behind them", () => {
    const inList = compare!([fitted, rival]) as periodwise.Comparison;
    expect((compare!(fitted, rival) as periodwise.Comparison).sentence).toBe(inList.sentence);
    const { rollingOrigin } = compare!(fitted, rival, { periods: 2 }) as periodwise.Comparison;
    expect(rollingOrigin?.periods).toBe(2);
  });

  test("a function over a list", () => {
    expect([fitted, rival].map(estimates!)).toHaveLength(2);
  });

  // Closed form: the equilibria of r*N*(1 - N/K) are 0 and K, with multipliers 1 + r and 1 - r.
  test("a fit where a rule is asked, at its estimates", () => {
    const { r, K } = fitted.values as { readonly r: number; readonly K: number };
    const found = equilibria!(fitted) as periodwise.Equilibria & { readonly notes: readonly string[] };
    const levels = found.points.map(({ at }) => at["N"]!);
    expect(levels[0]).toBeCloseTo(0, 9);
    expect(levels[1]! / K).toBeCloseTo(1, 9);
    expect(found.points[1]!.multipliers[0]!.re).toBeCloseTo(1 - r, 6);
    expect(found.notes).toEqual([
      `Worked out at the estimates: r ${Number(r.toPrecision(6))} and K ${Number(K.toPrecision(6))}.`,
    ]);
  });

  test("its trajectory begins at the fitted first value, and goes through the fitted values", () => {
    const { values } = trajectory!(fitted, { periods: 9 }) as periodwise.Trajectory;
    fitted.groups[0]!.points.forEach(({ fitted: each }, i) => {
      expect(values["N"]![i]! / each).toBeCloseTo(1, 9);
    });
    const steps = trajectory!(stepwise, { periods: 1 }) as periodwise.Trajectory;
    expect(steps.values["N"]![0]).toBe(10);
    const { r, K } = stepwise.values as { readonly r: number; readonly K: number };
    expect(steps.values["N"]![1]).toBeCloseTo(10 + r * 10 * (1 - 10 / K), 9);
  });

  test("its own interval is marked in an attractor, and its parameters can be given another value", () => {
    const { estimate } = attractor!(fitted, { vary: "r", values: [0.5, 1] }) as periodwise.Attractor;
    expect(estimate).toEqual({ value: fitted.values["r"], interval: fitted.interval("r") });
    const moved = trajectory!(fitted, {
      periods: 1,
      parameters: { K: 50 },
      initial: { N: 10 },
    }) as periodwise.Trajectory;
    expect(moved.values["N"]![1]).toBeCloseTo(10 + fitted.values["r"]! * 10 * (1 - 10 / 50), 9);
    expect(said(() => bifurcations!(fitted, { vary: "r", range: [0.5, 2.2] }))).toBe("nothing was refused");
  });

  test("a parameter that the record does not determine is named", () => {
    const early = observations!(
      { hour: [0, 1, 2, 3, 4, 5], N: [2, 3.1, 4.4, 6.7, 10.1, 15.3] },
      { period: "hour", step: "hour", value: "N" },
    );
    const open = fit!(logistic, early, { errors: "observation" }) as periodwise.Fit;
    const { notes } = equilibria!(open) as unknown as { readonly notes: readonly string[] };
    expect(notes[1]).toBe(
      "K is not determined by this record: other values explain it as well and may lead elsewhere.",
    );
  });

  test("options of a rule are refused beside a fit, and those of a fit beside a rule", () => {
    const until = { level: "N", at: 3, is: 50 };
    expect(
      said(() => solveFor!(fitted, { vary: "r", until, periods: 3, parameters: { r: 1 } })),
    ).toMatchInlineSnapshot(
      `"Option \`parameters\` goes with a rule, and a fit was given, which brings its own. Leave it out, or give \`fit.rule\`."`,
    );
    expect(
      said(() => equilibria!(logistic, { parameters: { r: 1, K: 2 }, group: "A" })),
    ).toMatchInlineSnapshot(`"Option \`group\` goes with a fit, and a rule was given. Leave it out."`);
  });
});

describe("progress and signal", () => {
  const signalled = (act: (hooks: object) => unknown): readonly [string, number] => {
    const controller = new AbortController();
    let calls = 0;
    const onProgress = (): boolean => {
      calls++;
      controller.abort();
      return false;
    };
    return [said(() => act({ onProgress, signal: controller.signal })), calls];
  };
  test.each([
    ["forecast", (hooks: object) => forecast!(fitted, { periods: 3, ...hooks })],
    ["simulate", (hooks: object) => simulate!(logistic, { ...logisticRun, ...hooks })],
    ["bootstrap", (hooks: object) => bootstrap!(fitted, { resamples: 20, ...hooks })],
    ["check", (hooks: object) => check!(fitted, { resamples: 50, ...hooks })],
    [
      "changePoint",
      (hooks: object) => changePoint!(growth, hours, { resamples: 19, leastShare: 0.3, ...hooks }),
    ],
    ["densityDependence", (hooks: object) => densityDependence!(hours, { resamples: 19, ...hooks })],
    ["compare", (hooks: object) => compare!([fitted, rival], hooks)],
    ["propose", (hooks: object) => periodwise.propose(hours as never, { errors: "observation", ...hooks })],
    ["gridInterval", (hooks: object) => gridInterval!(stepwise, "r", { resamples: 20, ...hooks })],
    [
      "solveFor",
      (hooks: object) =>
        solveFor!(fitted, { vary: "r", until: { level: "N", at: 3, is: 102 }, periods: 3, ...hooks }),
    ],
    [
      "optimize",
      (hooks: object) =>
        periodwise.optimize(fitted, {
          vary: "r",
          range: [0.1, 1],
          maximize: { total: "N" },
          periods: 5,
          ...hooks,
        }),
    ],
    [
      "sensitivity",
      (hooks: object) =>
        periodwise.sensitivity(fitted, { answer: { level: "N", at: 2 }, periods: 5, ...hooks }),
    ],
    [
      "tradeoff",
      (hooks: object) =>
        periodwise.tradeoff(fitted, {
          vary: "r",
          values: [0.5],
          answers: { low: { lowest: "N" } },
          periods: 5,
          ...hooks,
        }),
    ],
    [
      "nextReading",
      (hooks: object) =>
        periodwise.nextReading(fitted, { answer: { parameter: "K" }, periods: 5, paths: 50, ...hooks }),
    ],
    ["attractor", (hooks: object) => attractor!(fitted, { vary: "r", values: [0.5, 1], ...hooks })],
    ["basins", (hooks: object) => periodwise.basins(fitted, { range: [0, 110], count: 10, ...hooks })],
    ["lyapunovExponent", (hooks: object) => lyapunovExponent!(fitted, { periods: 300, ...hooks })],
  ])("%s ends at the first report after its signal, whatever that returns", (_, act) => {
    const [message, calls] = signalled(act);
    expect(message).toMatch(/^The signal ended the run after \d+ of \d+; its result is not kept\./);
    expect(calls).toBe(1);
    expect(said(() => act({ onProgress: () => false }))).toBe("nothing was refused");
  });
});
