import { expect, test } from "vitest";
import { type FitOptions, fit } from "../../src/estimate/index.js";
import type { Observations } from "../../src/record/index.js";
import { type Rule, recurrence } from "../../src/rule/index.js";
import { record } from "./record.js";

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const grown = record({ N: [10, 14, 19, 26, 35, 46, 58, 70] });
const trajectory: FitOptions = { errors: "observation" };
const said = (rule: Rule, observations: Observations, options: FitOptions): string => {
  try {
    fit(rule, observations, options);
    return "nothing";
  } catch (error) {
    return (error as Error).message;
  }
};

test("a fit that does not say where it puts the error", () => {
  expect(said(sheltered, grown, {} as FitOptions)).toMatchInlineSnapshot(
    `"A fit states where it puts the error. Give { errors: "observation" } when the scatter lies in the reading, or { errors: "process" } when it lies in the change itself, { errors: "both" } when neither can be left out."`,
  );
});

test("fewer values than unknowns + 3", () => {
  expect(said(sheltered, record({ N: [10, 14, 19, 26] }), trajectory)).toMatchInlineSnapshot(
    `"4 usable values for 3 unknowns (R, K, N[0]): not fitted. At least 6 are needed; use a rule with fewer parameters, fix some with { fixed }, or wait for more rows."`,
  );
});

test("a value that never changes", () => {
  expect(said(sheltered, record({ N: [5, 5, 5, 5, 5, 5, 5] }), trajectory)).toMatchInlineSnapshot(
    `"The value never changes (it is 5 in every row): a multiplier of 1 cannot be separated from no process at all. Check the column, or wait for a record that moves."`,
  );
});

test("a level without logarithm", () => {
  const zero = record({ N: [10, 14, 0, 26, 35, 46, 58, 70] });
  expect(said(sheltered, zero, { ...trajectory, distribution: "lognormal" })).toMatchInlineSnapshot(
    `"Row 3: level 0 has no logarithm, which a lognormal distribution needs. Choose { distribution: "normal" }, or leave the row out with a reason."`,
  );
});

test("values that are no counts", () => {
  const half = record({ N: [10, 14, 19.5, 26, 35, 46, 58, 70] });
  expect(said(sheltered, half, { ...trajectory, distribution: "poisson" })).toMatchInlineSnapshot(
    `"Row 3: 19.5 is not a count, which a Poisson or negative binomial distribution needs. Give whole numbers from 0, or choose { distribution: "normal" } or { distribution: "lognormal" }."`,
  );
});

test("a record that is censored throughout", () => {
  const censoring = { N: new Int8Array(8).fill(1) };
  const out = record({ N: [10, 14, 19, 26, 35, 46, 58, 70] }, { censoring });
  expect(said(sheltered, out, trajectory)).toMatchInlineSnapshot(
    `"Every value of N is only known to lie above its limit: nothing tells how far. At least some exact values are needed; until then only a one-sided statement is possible."`,
  );
});

test("a start outside its bounds", () => {
  const options: FitOptions = { ...trajectory, start: { R: 3 }, bounds: { R: [1, 2] } };
  expect(said(sheltered, grown, options)).toMatchInlineSnapshot(
    `"The start 3 of "R" lies outside its bounds, 1 to 2. Move the start or the bounds."`,
  );
});

test("a rule that explodes wherever it is begun", () => {
  const explosive = recurrence("N[t+1] = N*exp(r*N)");
  const options: FitOptions = { ...trajectory, start: { r: 5 }, initial: { N: 10 } };
  expect(said(explosive, grown, options)).toMatchInlineSnapshot(
    `"No parameters were found at which "N[t+1] = N*exp(r*N)" stays finite over the record. Give { start: { ... } } near plausible values, or { bounds: { ... } } that keep the rule in its range."`,
  );
});

test("a rule that jumps", () => {
  expect(said(recurrence("N[t+1] = round(R*N, 0)"), grown, trajectory)).toMatchInlineSnapshot(
    `""N[t+1] = round(R*N, 0)" jumps at round(...), so its parameters have no best value that a search could find: small changes of them change nothing, and then a whole step. Fit the rule without the rounding; keep it for schedules and projections."`,
  );
});

test("an input that is missing in a period", () => {
  const rule = recurrence("N[t+1] = R*N - catch", { inputs: ["catch"] });
  const holes = record(
    { N: [10, 14, 19, 26, 35, 46, 58, 70], catch: [1, 1, 1, Number.NaN, 1, 1, 1, 1] },
    { inputNames: ["catch"] },
  );
  expect(said(rule, holes, trajectory)).toMatchInlineSnapshot(
    `"The input "catch" is not recorded at week 3, which a step of the rule reads. Record it (0 where nothing happened), or fit the part of the record that has it."`,
  );
  expect(said(rule, grown, trajectory)).toMatchInlineSnapshot(
    `"The rule reads the input "catch", which the record does not hold. Name it in observations(..., { inputs })."`,
  );
});

test("names that the rule does not have", () => {
  expect(said(sheltered, grown, { ...trajectory, fixed: { capacity: 100 } })).toMatchInlineSnapshot(
    `"The rule has no parameter "capacity". It has: R, K."`,
  );
  const two = recurrence("A[t+1] = p*A\nB[t+1] = q*B");
  expect(said(two, grown, trajectory)).toMatchInlineSnapshot(
    `"The rule moves A, B, but the record holds N. Name the columns with { values: { A: "column", B: "column" } } in observations(...)."`,
  );
});

test("spreads and factors that no fit has", () => {
  expect(said(sheltered, grown, { ...trajectory, sd: -1 })).toMatchInlineSnapshot(
    `"Option \`sd\` is -1, with \`distribution: "normal"\`. Give a positive number, or the name of an input column of them: in the unit of the record for \`normal\`, on the log scale for \`lognormal\`."`,
  );
  expect(said(sheltered, grown, { errors: "both", distribution: "poisson" })).toMatchInlineSnapshot(
    `"Option \`distribution\` must be "normal", "lognormal", "poisson" or "negative-binomial"; poisson with errors in both was given. Counts go with \`errors: "process"\` or \`errors: "observation"\`."`,
  );
  expect(said(sheltered, grown, { errors: "process", factor: { N: "q" } })).toMatchInlineSnapshot(
    `"A factor of the record is found from whole trajectories, not with errors: "process". Use { errors: "observation" }, or write the factor into the rule."`,
  );
});

test("bounds whose lower end lies above the upper one", () => {
  expect(said(sheltered, grown, { ...trajectory, bounds: { K: [100, 50] } })).toMatchInlineSnapshot(
    `"Option \`bounds\`: the lower bound 100 of "K" lies above the upper bound 50. Write { bounds: { K: [50, 100] } }."`,
  );
  expect(said(sheltered, grown, { ...trajectory, bounds: { "N[0]": [20, 5] } })).toMatchInlineSnapshot(
    `"Option \`bounds\`: the lower bound 20 of "N[0]" lies above the upper bound 5. Write { bounds: { "N[0]": [5, 20] } }."`,
  );
  expect(said(sheltered, grown, { ...trajectory, bounds: { K: [50, 200] } })).toBe("nothing");
});

test("a factor under a name that is taken", () => {
  expect(said(sheltered, grown, { ...trajectory, factor: { N: "K" } })).toMatchInlineSnapshot(
    `"Option \`factor\`: "K" is already a parameter of the rule, and the factor of N is an unknown of its own. Give it another name, as { factor: { N: "q_N" } }."`,
  );
  const two = recurrence("A[t+1] = p*A\nB[t+1] = q*B");
  const both = record({ A: [10, 14, 19, 26, 35, 46, 58, 70], B: [9, 8, 7, 6, 5, 4, 3, 3] });
  expect(said(two, both, { ...trajectory, factor: { A: "s", B: "s" } })).toMatchInlineSnapshot(
    `"Option \`factor\`: "s" is already the factor of another state, and the factor of B is an unknown of its own. Give it another name, as { factor: { B: "q_B" } }."`,
  );
  expect(said(two, both, { ...trajectory, factor: { A: "B" } })).toContain("already a state of the rule");
});

test("a filter does not take a limit for a reading", () => {
  const censoring = { N: Int8Array.of(0, 0, 0, 0, 0, 0, -1, -1, 0, 0) };
  const limited = record({ N: [100, 61, 36, 24, 12, 9, 5, 5, 4, 3] }, { censoring });
  const decay = recurrence("N[t+1] = R*N");
  expect(said(decay, limited, { errors: "both" })).toMatchInlineSnapshot(
    `"Row 7: N is only known up to a limit (a censored value), and \`errors: "both"\` would take the limit for a reading. Write \`errors: "observation"\` or \`errors: "process"\`, which count such values as beyond their limit."`,
  );
  expect(said(decay, limited, { errors: "observation" })).toBe("nothing");
  expect(said(decay, limited, { errors: "process" })).toBe("nothing");
});
