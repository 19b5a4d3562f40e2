import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { caseLog } from "../../kernel-helpers/functions/case-log.js";
import {
  answer,
  closeCase,
  compare,
  fit,
  forecast,
  observations,
  openCase,
  readRecord,
  recurrence,
} from "../../kernel-helpers/index.js";

const record = (values: readonly number[]): ReturnType<typeof observations> =>
  observations(
    { week: values.map((_, i) => i), N: values },
    { period: "week", step: { every: 1, of: "week" }, value: "N" },
  );
const wobble = (t: number): number => ((t * 7) % 3) - 1;
/** Grows by 10 a week. */
const straight = Array.from({ length: 14 }, (_, t) => 100 + 10 * t + wobble(t));
/** Grows by a fifth a week. */
const curved = Array.from({ length: 14 }, (_, t) => 100 * 1.2 ** t + wobble(t));

const steady = recurrence("N[t+1] = N + c", { name: "steady" });
const growing = recurrence("N[t+1] = R*N", { name: "growing" });
const both = (of: ReturnType<typeof record>): ReturnType<typeof fit>[] =>
  [steady, growing].map((rule) => fit(rule, of, { errors: "observation" }));

/** What a cell shows, as text. */
const shown: Promise<string>[] = [];
const display = Symbol.for("periodwise.display");

beforeEach(() => {
  shown.length = 0;
  Object.assign(globalThis, {
    [display]: (bundle: Promise<Readonly<Record<string, unknown>>>) => {
      shown.push(Promise.resolve(bundle).then((own) => `${own["text/plain"]}`));
    },
  });
});
afterEach(() => {
  Reflect.deleteProperty(globalThis, display);
});

const open = (title = "Two records"): void =>
  openCase({ title, question: "How many by then?", domain: "stock", seed: 3 });
const answered = async (): Promise<string> => {
  answer("About 300 by then.");
  return (await shown.at(-1))!;
};

test("without an open case nothing is kept between calls without an open case", async () => {
  expect(caseLog.head()).toBeUndefined();
  const counts = record(straight);
  compare(both(counts));
  await readRecord("notebooks/data/mooring-shackles.csv");
  expect([...caseLog.steps(), ...caseLog.records(), ...caseLog.cautions()]).toEqual([]);
  expect(caseLog.seed()).toBe(1);
});

describe("a comparison cautions against rules that it ruled out on the same record", () => {
  test("the same rules on another record carry no caution", async () => {
    open();
    const a = both(record(straight));
    const b = both(record(curved));
    expect(compare(a).verdict.rules).toEqual(["steady"]);
    expect(compare(b).verdict.rules).toEqual(["growing"]);
    forecast(a[0]!, { periods: 3, paths: 20 });
    expect(await answered()).not.toContain("Caution");
  });

  test("an answer that rests on the rule ruled out on its own record does", async () => {
    open();
    const a = both(record(straight));
    const b = both(record(curved));
    compare(a);
    compare(b);
    forecast(a[1]!, { periods: 3, paths: 20 });
    forecast(b[1]!, { periods: 3, paths: 20 });
    expect(await answered()).toContain(
      'Caution: The answer rests on "growing", but the comparison on the same record supports "steady" instead.',
    );
  });

  test("also where the rule is fitted again, and the record goes by the rule's own name of the state", async () => {
    open();
    const counted = observations(
      { week: straight.map((_, i) => i), counted: straight },
      { period: "week", step: { every: 1, of: "week" }, value: "counted" },
    );
    compare(both(counted));
    forecast(fit(growing, counted, { errors: "observation" }), { periods: 3, paths: 20 });
    expect(await answered()).toContain('rests on "growing"');
  });

  test("not where a rule that stands was carried forward as well, nor after a later comparison supports it", async () => {
    open();
    const counts = record(straight);
    const fits = both(counts);
    compare(fits);
    for (const each of fits) forecast(each, { periods: 3, paths: 20 });
    expect(await answered()).not.toContain("Caution");
    open();
    const worse = fit(recurrence("N[t+1] = 0.5*N + c"), counts, { errors: "observation" });
    compare(fits);
    compare([fits[1]!, worse]);
    forecast(fits[1]!, { periods: 3, paths: 20 });
    const text = await answered();
    expect(text).not.toContain('supports "steady"');
  });
});

describe("an open case", () => {
  test("a case opened again starts afresh", async () => {
    open("First");
    await readRecord("notebooks/data/mooring-shackles.csv");
    const a = both(record(straight));
    compare(a);
    forecast(a[1]!, { periods: 3, paths: 20 });
    answer("Of the first case.");
    open("Second");
    expect([...caseLog.steps(), ...caseLog.records(), ...caseLog.answers(), ...caseLog.cautions()]).toEqual(
      [],
    );
    expect(() => closeCase()).toThrow("The case has no answer yet");
  });

  test("a file that was read before the case was opened is in its rerun block once it is used", async () => {
    const card = await readRecord("notebooks/data/mooring-shackles.csv");
    open();
    observations(card, { period: "week", step: { every: 1, of: "week" }, value: "counted" });
    answer("Used.");
    closeCase();
    expect(await shown.at(-1)).toContain("Record notebooks/data/mooring-shackles.csv");
  });

  test("the steps name a rule and give its lines", () => {
    open();
    both(record(straight));
    expect(caseLog.steps().join("\n")).toContain('fit "steady" (N[t+1] = N + c) with errors: observation');
  });
});
