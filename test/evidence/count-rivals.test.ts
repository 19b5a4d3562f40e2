import { expect, test } from "vitest";
import { fit } from "../../src/estimate/index.js";
import { changePoint, compare } from "../../src/evidence/index.js";
import { recurrence } from "../../src/rule/index.js";
import { record } from "../estimate/record.js";

const level = recurrence("x[t+1] = m");
const demand = [
  22, 9, 31, 17, 40, 12, 25, 8, 19, 28, 14, 21, 35, 11, 23, 6, 18, 30, 27, 13, 16, 24, 20, 10, 38, 15, 26, 19,
  7, 29,
];

// Source: SciPy 1.17.1, stats.poisson and stats.nbinom of the 29 values after the first around their mean 20.3793103, the
// dispersion by optimize.minimize: AICc 263.488973 and 213.797670.
test("counts that scatter more than Poisson: the negative binomial level is supported, naive though it is", () => {
  const fits = (["negative-binomial", "poisson"] as const).map((distribution) =>
    fit(level, record({ x: demand }), { errors: "process", distribution }),
  );
  const compared = compare(fits);
  expect(compared.rows.map((row) => row.aicCorrected.toFixed(6))).toEqual(["213.797670", "263.488973"]);
  expect(compared.verdict).toEqual({ kind: "supported", rules: ["x[t+1] = m, negative-binomial"] });
  expect(compared.notes.join(" ")).not.toMatch(/sigma|ln\(y\)/);
});

test("a rule that adds a parameter to the mean level and explains no more is not adequate", () => {
  const steady = { errors: "process", distribution: "negative-binomial" } as const;
  const rivals = [recurrence("x[t+1] = a + b*x"), recurrence("x[t+1] = a*exp(-b*x)")];
  const compared = compare(rivals.map((rule) => fit(rule, record({ x: demand }), steady)));
  const better = compared.rows[0]!.aicCorrected < 213.79767;
  expect(compared.verdict.kind === "none-adequate").toBe(!better);
});

test.each(["poisson", "negative-binomial"] as const)(
  "a break is not searched for in %s counts, and the option to change is named",
  (distribution) => {
    // A caller without types can still ask for it.
    const options = { distribution } as unknown as { distribution: "normal" };
    expect(() => changePoint(level, record({ x: demand }), options)).toThrow(
      expect.objectContaining({
        code: "break-not-searched",
        message: expect.stringContaining(`\`distribution: "${distribution}"\``),
      }),
    );
    expect(changePoint(level, record({ x: demand }), { distribution: "normal" }).groups).toHaveLength(1);
  },
);

test("a break is not searched for among values known only to a limit", () => {
  const censoring = { x: Int8Array.from(demand, (value) => (value === 40 ? 1 : 0)) };
  expect(() => changePoint(level, record({ x: demand }, { censoring }))).toThrow(
    expect.objectContaining({ code: "break-not-searched", message: expect.stringContaining("censored") }),
  );
});
