import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { loadResult as loadShown, saveResult as saveShown } from "../../kernel-helpers/index.js";
import { type FitOptions, fit } from "../../src/estimate/index.js";
import { compare } from "../../src/evidence/index.js";
import { loadResult, saveResult } from "../../src/numeric/index.js";
import { forecast } from "../../src/projection/index.js";
import { recurrence } from "../../src/rule/index.js";
import { record } from "../estimate/record.js";

/** Any double, by its bits: NaN, infinities, -0 and subnormal numbers among them. */
const double = fc.double({ noDefaultInfinity: false, noNaN: false });
const member = fc.letrec((tie) => ({
  value: fc.oneof(
    { depthSize: "small" },
    double,
    fc.string(),
    fc.boolean(),
    fc.constant(null),
    fc.constant(undefined),
    fc.bigInt(),
    fc.float64Array(),
    fc.int32Array(),
    fc.int8Array(),
    fc.array(tie("value"), { maxLength: 4 }),
    fc.dictionary(fc.oneof(fc.string(), fc.constantFrom("$number", "$", "__proto__", "kind")), tie("value"), {
      maxKeys: 4,
      noNullPrototype: true,
    }),
  ),
})).value;

/** The bits of every number, the class of every object, and every member, the undefined ones too. */
function told(value: unknown): string {
  if (typeof value === "number") return `n${Buffer.from(Float64Array.of(value).buffer).toString("hex")}`;
  if (typeof value === "bigint") return `b${value}`;
  if (ArrayBuffer.isView(value))
    return `${value.constructor.name}${Buffer.from(value.buffer, value.byteOffset, value.byteLength).toString("hex")}`;
  if (Array.isArray(value)) return `[${value.map(told).join()}]`;
  if (typeof value === "object" && value !== null)
    return `{${Object.entries(value)
      .map(([name, part]) => `${JSON.stringify(name)}:${told(part)}`)
      .join()}}`;
  return `${typeof value}${JSON.stringify(value)}`;
}

/** NaN has many bit patterns, of which a result never means one: they count as one. */
const quiet = (text: string): string =>
  text.replace(/n[0-9a-f]{12}f[8-9a-f]7f|n[0-9a-f]{12}f[8-9a-f]ff/g, "nNaN");

test("what is saved is loaded with every bit of every number", () => {
  fc.assert(
    fc.property(member, (value) => {
      const result = { kind: "anything", value };
      expect(quiet(told(loadResult(saveResult(result))))).toBe(quiet(told(result)));
    }),
    { seed: 11, numRuns: 400 },
  );
});

const crowding = recurrence("ΔN = r*N*(1 - N/K)");
const N = [10, 18, 31, 50, 69, 85, 93, 97, 99, 100];
const counted = [2, 3, 3, 6, 8, 9, 14, 19, 24, 37];
const fits: readonly (readonly [string, FitOptions, readonly number[]])[] = [
  ["trajectory", { errors: "observation" }, N],
  ["one-step, lognormal", { errors: "process", distribution: "lognormal" }, N],
  ["robust", { errors: "observation", robust: true }, N],
  ["errors in both", { errors: "both", distribution: "lognormal" }, N],
  ["Poisson", { errors: "observation", distribution: "poisson", bounds: { K: [0, 1e6] } }, counted],
  ["a parameter held", { errors: "observation", fixed: { K: 100 } }, N],
];

describe("a saved fit", () => {
  test.each(fits)(
    "%s: loads to the same digits, and its forecast is the same to the byte",
    (_, options, values) => {
      const fitted = fit(crowding, record({ N: values }), options);
      const loaded = loadResult<typeof fitted>(saveResult(fitted));
      expect(told(loaded)).toBe(told(fitted));
      const ahead = forecast(fitted, { periods: 5, paths: 200 });
      expect(saveResult(forecast(loaded, { periods: 5, paths: 200 }))).toBe(saveResult(ahead));
      expect(told(loadResult(saveResult(ahead)))).toBe(told(ahead));
    },
  );

  test("of several groups, combined: the same criteria and comparison", () => {
    const groups = { A: { N }, B: { N: N.map((value) => value * 1.1) } };
    const apart = fit(crowding, record(groups), { errors: "observation" });
    const together = fit(crowding, record(groups), { errors: "observation", groups: "combined" });
    const again = [apart, together].map((each) => loadResult<typeof each>(saveResult(each)));
    expect(told(compare(again))).toBe(told(compare([apart, together])));
  });

  test("says its format and version, and refuses other text and later versions", () => {
    const text = saveResult(fit(crowding, record({ N }), { errors: "observation" }));
    expect(JSON.parse(text)).toMatchObject({ format: "periodwise result", version: 1, kind: "fit" });
    const later = text.replace('"version":1', '"version":2');
    expect(() => loadResult(later)).toThrow(expect.objectContaining({ code: "newer-format" }));
    for (const other of ["", "{}", "[1]", "null", '{"format":"x"}'])
      expect(() => loadResult(other)).toThrow(expect.objectContaining({ code: "no-saved-result" }));
    expect(() => saveResult({ kind: "fit", of: () => 1 } as { kind: string })).toThrow(
      expect.objectContaining({
        code: "not-savable",
        message: expect.stringMatching(/^result\.of is a function/),
      }),
    );
  });

  test("loaded in a cell it shows itself and answers by name", async () => {
    const fitted = fit(crowding, record({ N }), { errors: "observation" });
    const shown = loadShown(saveShown(fitted));
    expect(shown.kind).toBe("fit");
    expect("values" in shown && (shown.values as Record<string, number>)["r"]).toBe(
      fitted.groups[0]!.estimates[0]!.value,
    );
  });
});
