// Limits of profiles at the cut F(1, n - p). Source of the values: SciPy 1.17.1, the same model with q taken out by the mean
// of logarithms: Nelder-Mead over the other unknowns from seven starts at every value, differential evolution beside it for
// r and K of the first record, brentq on the rise; no code is shared. Printed to 7 digits or more: tolerance 2e-7 relative,
// wider where a limit rests on an optimum at infinity, which SciPy was given and a search only comes near.
import { expect, test } from "vitest";
import { type Estimate, type FitOptions, fit, type GroupFit } from "../../src/estimate/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { type Rule, recurrence, rules } from "../../src/rule/index.js";
import { record } from "./record.js";

const trajectory: FitOptions = { errors: "observation", distribution: "lognormal" };
const steps: FitOptions = { errors: "process", distribution: "lognormal" };

const estimateOf = (group: GroupFit, name: string): Estimate =>
  group.estimates.find((each) => each.name === name)!;

function expectLimits(
  group: GroupFit,
  name: string,
  [lower, upper]: readonly [number | undefined, number | undefined],
  tolerance = 2e-7,
): void {
  const { profile } = estimateOf(group, name);
  for (const [found, expected] of [
    [profile.lower, lower],
    [profile.upper, upper],
  ] as const) {
    if (expected === undefined) expect(found, name).toBeUndefined();
    else expect(Math.abs(found! - expected), name).toBeLessThan(tolerance * Math.abs(expected));
  }
}

/** Invented: thirty years of an index of a fished stock, whose path breaks off where too little is left. */
const index = [
  10.439, 11.87, 9.929, 10.145, 8.675, 13.72, 10.189, 12.919, 11.119, 7.178, 10.398, 6.962, 8.403, 6.394,
  6.647, 6.628, 4.727, 4.448, 2.993, 5.517, 4.09, 3.672, 4.696, 5.507, 3.807, 6.698, 5.215, 4.416, 5.542,
  8.362,
];
const C = [
  74, 111, 135, 162, 192, 224, 252, 267, 284, 315, 359, 397, 378, 411, 461, 362, 419, 375, 325, 297, 227, 268,
  197, 179, 168, 164, 151, 155, 189, 178,
];
const inputs = { inputs: ["C"] };

function stockFit(rule: Rule, state: string, factor: string): GroupFit {
  const rows = record({ [state]: index, C }, { inputNames: ["C"] });
  return fit(rule, rows, { ...trajectory, factor: { [state]: factor } }).groups[0]!;
}

test("limits where the path of the rule breaks off beside them: Schaefer's rule", () => {
  const group = stockFit(rules.schaefer(inputs), "B", "q");
  expectLimits(group, "r", [0.2101023882, 0.5389807954]);
  expectLimits(group, "K", [2268.438003, 4584.834877]);
  expectLimits(group, "B[0]", [1550.79409, 5045.033822]);
  expectLimits(group, "q", [0.002404668625, 0.00577320283]);
  expect(group.estimates.every(({ standardError }) => standardError! > 0)).toBe(true);
  expect(group.warnings.filter(({ code }) => code === "not-determined")).toEqual([]);
});

test("the same record with the largest sustained yield for the rate", () => {
  const bounds = { MSY: [1, 2000], K: [500, 1e5] } as const;
  const rule = recurrence("ΔD = 4*MSY/K*D*(1 - D) - C/K", { ...inputs, bounds });
  const group = stockFit(rule, "D", "scale");
  expectLimits(group, "MSY", [238.9891274, 306.0319369]);
  expectLimits(group, "K", [2268.438003, 4584.834877]);
  expectLimits(group, "D[0]", [0.5947468638, 1.290298322]);
  expectLimits(group, "scale", [10.48668245, 14.22153291]);
});

test("limits of Fox's rule", () => {
  const group = stockFit(rules.fox(inputs), "B", "q");
  expectLimits(group, "r", [0.125127934, 0.2820645001]);
  expectLimits(group, "K", [2809.524695, 5133.434421]);
  expectLimits(group, "B[0]", [1683.467471, 5246.267264]);
  expectLimits(group, "q", [0.002285905084, 0.005313030953]);
});

/** Invented: final counts of three cultures diluted 1:100 a day, which all but fill their vessel. */
const finals = [
  [3.872, 3.608, 4.139, 4.204, 3.898, 4.601, 3.64, 4.038, 4.07, 3.928, 4.208],
  [3.767, 4.329, 3.695, 3.701, 4.473, 3.665, 3.851, 3.91, 3.711, 3.886, 3.702],
  [3.761, 4.023, 4.076, 4.273, 4.435, 3.75, 4.056, 4.425, 3.78, 4.21, 3.594],
];
const culture = (line: number): { N: number[] } => ({ N: finals[line]!.map((value) => value * 1e9) });
const cultures = record({ one: culture(0), two: culture(1), three: culture(2) });
const transfer = rules.transfer({ fixed: { D: 100 } });

test("a limit far below an optimum at infinity is found, groups combined and apart", () => {
  const [together] = fit(transfer, cultures, { ...steps, groups: "combined" }).groups;
  expectLimits(together!, "G", [508.9602134, undefined], 5e-6);
  expectLimits(together!, "K", [3879682283, 4958481365], 1e-6);
  const apart = fit(transfer, cultures, steps).groups;
  const lower = [193.4861258, 208.1746411, 167.3550866];
  for (const [line, group] of apart.entries()) expectLimits(group, "G", [lower[line], undefined], 5e-6);
  expectLimits(apart[0]!, "K", [3806735334, 8368655578], 1e-6);
  expectLimits(apart[1]!, "K", [3678139078, 7434612954], 1e-6);
  for (const group of [together!, ...apart]) {
    expect(estimateOf(group, "G").standardError).toBeUndefined();
    expect(group.rivals).toEqual([]);
    const told = group.warnings.find(({ code }) => code === "not-determined")!.message;
    expect(told).toBe("G is not determined by this record (it has no finite optimum).");
  }
});

test("the limit does not depend on how the unknown is written: exp(m) for G", () => {
  const rule = recurrence("N[t+1] = exp(m)*(N/D)/(1 + (exp(m) - 1)*(N/D)/K)", { fixed: { D: 100 } });
  const [together] = fit(rule, cultures, { ...steps, groups: "combined" }).groups;
  expectLimits(together!, "m", [Math.log(508.9602134), undefined], 5e-6);
  expectLimits(together!, "K", [3879682283, 4958481365], 1e-6);
  expect(estimateOf(together!, "m").standardError).toBeUndefined();
});

/** Invented: a yield that has hardly begun to saturate, so that little more than v/k is known. */
const early = [2, 2.21, 2.39, 2.74, 2.93, 3.33, 3.61, 3.89, 4.39, 4.7, 5.32, 5.7, 6.42, 6.88, 7.61, 8.5];

test("a ridge that is open at one end has its limit at the other, in either parametrisation", () => {
  const [plain] = fit(recurrence("N[t+1] = N + v*N/(k + N)"), record({ N: early }), steps).groups;
  expectLimits(plain!, "v", [0.9183623878, undefined]);
  expectLimits(plain!, "k", [5.41013386, undefined]);
  const inLogs = recurrence("N[t+1] = N + exp(a)*N/(exp(b) + N)");
  const [logs] = fit(inLogs, record({ N: early }), steps).groups;
  expectLimits(logs!, "a", [Math.log(0.9183623878), undefined], 5e-6);
  expectLimits(logs!, "b", [Math.log(5.41013386), undefined], 5e-6);
  for (const { standardError } of [...plain!.estimates, ...logs!.estimates])
    expect(standardError).toBeUndefined();
});

/** Invented: a population about its capacity, where the theta-logistic rule tells little more than r * theta. */
const nearCapacity = [
  100, 117.7, 117.7, 108.8, 103.6, 94.7, 99, 83.9, 96.3, 93.8, 95.4, 93.4, 74.9, 86.4, 83.6, 110.6, 87.8, 110,
  116, 88.1, 103.6, 94.6, 111.8, 106.1, 91.4, 101.2, 95.6, 107.9, 101, 96.8,
];

test("an optimum at theta = 0 and r at infinity: neither is determined, and no limit comes from rounding", () => {
  const [group] = fit(rules.thetaLogistic(), record({ N: nearCapacity }), steps).groups;
  expectLimits(group!, "r", [0.08385651071, undefined], 1e-6);
  expectLimits(group!, "theta", [undefined, 7.324884411], 1e-6);
  expectLimits(group!, "K", [92.26669902, 105.1034441], 1e-6);
  // The sum of squares in the limit, that of the Gompertz rule.
  expect(Math.abs(group!.sumOfSquares - 0.332613387)).toBeLessThan(1e-6);
  expect(estimateOf(group!, "r").value).toBeLessThan(1e7);
  for (const name of ["r", "theta"]) expect(estimateOf(group!, name).standardError).toBeUndefined();
});

test.each(["(p*q)*N", "p/q*N", "(p + q)*N"])(
  "only one number enters N[t+1] = %s: both open on both sides",
  (text) => {
    for (const options of [steps, trajectory]) {
      const [group] = fit(recurrence(`N[t+1] = ${text}`), record({ N: early }), options).groups;
      for (const name of ["p", "q"]) {
        expectLimits(group!, name, [undefined, undefined]);
        expect(estimateOf(group!, name).standardError).toBeUndefined();
      }
    }
  },
);

test("of records about their capacity none gives r or theta a size that only rounding tells", () => {
  const stream = randomStream(5);
  for (let k = 0; k < 8; k++) {
    const N = [100];
    for (let t = 0; t < 29; t++) N.push(N[t]! * Math.exp(0.5 * (1 - N[t]! / 100) + 0.1 * stream.normal()));
    const [group] = fit(rules.thetaLogistic(), record({ N }), steps).groups;
    for (const { value, standardError = 0, profile } of group!.estimates) {
      const sizes = [value, profile.upper ?? 1, 1 / (profile.lower ?? 1)].map(Math.abs);
      expect(Math.max(...sizes)).toBeLessThan(1e8);
      expect(standardError).toBeLessThan(100 * Math.abs(value));
    }
  }
});

test("every limit is one: the fit done again there from other starts rises by the cut", () => {
  const [group] = fit(rules.thetaLogistic(), record({ N: nearCapacity }), steps).groups;
  const s2 = group!.sumOfSquares / group!.degreesOfFreedom;
  for (const { name, profile } of group!.estimates)
    for (const limit of [profile.lower, profile.upper]) {
      if (limit === undefined) continue;
      const sums = [0.01, 0.3, 1, 3].map((theta) => {
        const start = { r: 0.5 / theta, K: 98, theta, [name]: limit };
        const options = { ...steps, fixed: { [name]: limit }, start, intervals: "none" } as const;
        return fit(rules.thetaLogistic(), record({ N: nearCapacity }), options).groups[0]!.sumOfSquares;
      });
      expect(Math.abs((Math.min(...sums) - group!.sumOfSquares) / s2 - group!.cut)).toBeLessThan(1e-3);
    }
});
