import { afterEach, describe, expect, test } from "vitest";
import { caseLog } from "../../kernel-helpers/functions/case-log.js";
import { lookUp, terms } from "../../kernel-helpers/glossary/index.js";
import { nearWords } from "../../kernel-helpers/glossary/near-words.js";
import { explain } from "../../kernel-helpers/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";
import { ruleLanguage } from "../../src/rule/index.js";

afterEach(() => void caseLog.open({ title: "", question: "", domain: "", seed: 1 }));

const message = (word: string): string => {
  try {
    explain(word);
  } catch (error) {
    return (error as Error).message;
  }
  return "";
};

const shown = async (word: string): Promise<string> =>
  String((await bundleOf(explain(word)))?.["text/plain"]);

describe("the glossary", () => {
  test("has each name once in a field", () => {
    const names = terms.map(({ field, name }) => `${field}: ${name.toLowerCase()}`);
    expect(names).toHaveLength(new Set(names).size);
  });

  test("has an entry for every related term and every near word", () => {
    const unknown = terms
      .flatMap(({ related }) => related)
      .concat(Object.values(nearWords).flat())
      .filter((name) => lookUp(name)?.isExact !== true);
    expect(unknown).toEqual([]);
  });

  test("defines every term in whole sentences", () => {
    const bad = terms
      .filter(({ meaning }) => !/^[\p{Lu}\p{N}-].*\.$/su.test(meaning))
      .map(({ name }) => name);
    expect(bad).toEqual([]);
  });

  // The words of tables, of the trade and of options that a reader meets (common practice, no source).
  test.each(
    [
      "AICc, profile interval, standard error, observation error, process error, residual, margin, seed, rival",
      "naive forecast, undecided, future observation, amortisation, present value, annuity, minimum payment",
      "instalment, compounding, day count, carrying capacity, doubling time, blank, cfu, log reduction, D-value",
      "chemostat, dilution rate, washout, selection coefficient, reorder point, safety stock, order-up-to",
      "shelf life, newsvendor, economic order quantity, bullwhip, censored demand, Croston, service level, MSY",
      "surplus production, Lyapunov exponent, prediction horizon, equilibrium, fixed point, identifiability",
      "resamples, innovation, leverage, profile, quantile, change point, first passage, fallsTo, byGroup, vary",
    ]
      .join(", ")
      .split(", "),
  )("explains %s", (word) => {
    expect(lookUp(word)).toMatchObject({ isExact: true });
  });

  test("explains every function and reserved word of the rule language", () => {
    const { functions, words } = ruleLanguage();
    const missing = [...functions, ...words].filter(
      ({ name }) => lookUp(name, "rule language") === undefined,
    );
    expect(missing).toEqual([]);
  });
});

describe("explain", () => {
  test("finds a term in any case, in the plural and with hyphens", () => {
    const names = ["Fill Rate", "fill-rate", "fill rates", " fill rate "].map(
      (word) => explain(word).term.name,
    );
    expect(new Set(names)).toEqual(new Set(["fill rate"]));
  });

  test("leads from a near word to its term, and shows the choice", async () => {
    expect(explain("growth rate").term.name).toBe("specific growth rate");
    expect(explain("growth rate").others).toEqual(["multiplier per period", "doublings per hour"]);
    expect(await shown("growth rate")).toMatch(
      /^"growth rate" is explained as "specific growth rate"; it can also mean "multiplier per period" or "doublings per hour"\./,
    );
    expect(explain("lag phase").term.name).toBe("lag");
    expect(explain("ln").term).toMatchObject({ name: "log", field: "rule language" });
  });

  test("prefers the terms of the open case's own field", () => {
    const field = (domain: string): string => {
      caseLog.open({ title: "", question: "", domain, seed: 1 });
      return explain("rate").term.field;
    };
    expect([field("debts"), field("cultures")]).toEqual(["debts", "cultures"]);
  });

  test("shows formula, unit, confusions and related terms", async () => {
    const text = await shown("doubling time");
    expect(text).toContain("Formula: ln(2)/mu");
    expect(text).toContain("Unit: hours");
    expect(text).toContain("- specific growth rate: a time, not a rate");
    expect(text).toContain("See also: specific growth rate");
  });

  test("an unknown word is answered with near terms and the terms of the case's own field first", () => {
    expect(message("fil rate")).toMatch(
      /^There is no explanation of "fil rate"\. Did you mean "fill rate" or "flat rate"\?$/,
    );
    caseLog.open({ title: "", question: "", domain: "harvest", seed: 1 });
    expect(message("gearbox").split("\n")).toEqual([
      'There is no explanation of "gearbox".',
      expect.stringMatching(/^Terms of harvest: biomass, catch, /),
      expect.stringMatching(/^General terms: AIC, /),
      expect.stringMatching(/^Other fields: debts \(\d+ terms\), /),
    ]);
  });

  test("no word is answered with an example", () => {
    expect(() => explain(undefined as never)).toThrow(
      'Give a term to explain, such as explain("fill rate").',
    );
  });
});
