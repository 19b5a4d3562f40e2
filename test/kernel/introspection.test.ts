import { describe, expect, test } from "vitest";
import { testKernel } from "./kernel-in-test.js";

const kernel = await testKernel();
await kernel.run(
  'import { recurrence, explain, leastSquares } from "periodwise";\nconst ferry = { owed: 1200, rate: 0.05 };',
);

interface Completion {
  readonly matches: readonly string[];
  readonly cursor_start: number;
  readonly cursor_end: number;
  readonly metadata: {
    readonly _jupyter_types_experimental: readonly { readonly text: string; readonly type: string }[];
  };
}

/** The bar in the text is the cursor. */
async function complete(
  marked: string,
): Promise<Completion & { kindOf: (name: string) => string | undefined }> {
  const at = marked.indexOf("|");
  const content = { code: marked.replace("|", ""), cursor_pos: [...marked.slice(0, at)].length };
  const reply = (await kernel.ask("complete_request", content)) as unknown as Completion;
  const kinds = reply.metadata._jupyter_types_experimental;
  return { ...reply, kindOf: (name) => kinds.find(({ text }) => text === name)?.type };
}

async function about(marked: string, detail_level = 0): Promise<string> {
  const at = marked.indexOf("|");
  const content = {
    code: marked.replace("|", ""),
    cursor_pos: [...marked.slice(0, at)].length,
    detail_level,
  };
  const reply = await kernel.ask("inspect_request", content);
  return String((reply["data"] as Record<string, string>)["text/markdown"] ?? "");
}

// Source: Jupyter client documentation, "Messaging in Jupyter", "Completion" and "Introspection"; ECMAScript for
// what Math has.
describe("completion", () => {
  test("offers members with their kinds, and the range to replace", async () => {
    const { matches, cursor_start, cursor_end, kindOf } = await complete("Math.sq|");
    expect(matches).toContain("sqrt");
    expect([cursor_start, cursor_end]).toEqual([5, 7]);
    expect(kindOf("sqrt")).toBe("method");
  });

  test("offers names declared in earlier cells", async () => {
    expect((await complete("fer|")).kindOf("ferry")).toBe("const");
    expect((await complete("ferry.|")).matches).toEqual(["owed", "rate"]);
  });

  test("counts code points, not UTF-16 units", async () => {
    const { cursor_start, cursor_end } = await complete('const s = "🐟🐟"; Math.sq|');
    expect([cursor_start, cursor_end]).toEqual([21, 23]);
  });

  test("inside the text of a rule offers names, functions and reserved words", async () => {
    const names = await complete('recurrence("N[t+1] = N + r*N*(1 - N/K) - exp(|)")');
    expect(names.matches).toEqual(expect.arrayContaining(["N", "r", "K", "sqrt", "min", "t"]));
    expect(names.kindOf("sqrt")).toBe("function");
    const one = await complete('recurrence("N[t+1] = R*N/(1 + capacity*N) + cap|")');
    expect(one.matches).toContain("capacity");
    expect(one.cursor_end - one.cursor_start).toBe(3);
  });

  test("in an empty rule offers the texts of catalogue rules", async () => {
    expect((await complete('recurrence("|")')).matches.length).toBeGreaterThan(5);
    const { matches, kindOf } = await complete('recurrence("logi|")');
    expect(matches).toHaveLength(1);
    expect(kindOf(matches[0] ?? "")).toBe("rule logistic");
    expect((await kernel.run(`recurrence("${matches[0]}").states.length`)).value).toBe("1");
  });

  test("inside explain offers the terms of the glossary", async () => {
    expect((await complete('explain("fill|")')).matches).toEqual(["fill rate"]);
  });
});

describe("inspection", () => {
  test("shows type and docstring of the package's functions as Markdown", async () => {
    const text = await about("recurr|ence");
    expect(text).toMatch(/^```typescript\n.*function recurrence\(text: string/s);
    expect(text).toContain("Reads a rule of change from text");
    expect(await about("expl|ain")).toContain("*param* word");
  });

  test("gives options and an example at detail level 0", async () => {
    expect(await about("leastSquar|es")).toContain("*example*");
  });

  test("shows the docstrings of the language itself", async () => {
    expect(await about("Math.sqr|t")).toContain("square root");
  });

  test("describes the function whose brackets enclose the cursor", async () => {
    expect(await about('recurrence("N[t+1] = N", |')).toContain("recurrence(text: string");
  });

  test("inside the text of a rule describes names and functions", async () => {
    expect(await about('recurrence("N[t+1] = mi|n(N, K)")')).toContain("smallest");
    expect(await about('recurrence("N[t+1] = N + r*N*(1 - N/K|)")')).toContain("parameter of this rule");
  });

  test("finds nothing in empty text", async () => {
    const reply = await kernel.ask("inspect_request", { code: "   ", cursor_pos: 1, detail_level: 0 });
    expect(reply).toMatchObject({ status: "ok", found: false, data: {} });
  });
});

describe("the text of a rule", () => {
  test("with an error is rejected at its position in the cell, before the cell runs", async () => {
    const { reply, stdout } = await kernel.run(
      'console.log("ran");\nconst rule = recurrence("N[t+1] = r*N(1 - N/K)");',
    );
    expect(stdout).toBe("");
    expect(reply["ename"]).toBe("SyntaxError");
    const text = (reply["traceback"] as readonly string[]).at(-1) ?? "";
    const [line = "", caret = ""] = text.split("\n").slice(-2);
    expect(line.slice(caret.indexOf("^"), caret.lastIndexOf("^") + 1)).toContain("N");
  });

  test("is checked with the names declared in the call", async () => {
    const good = 'recurrence("owed[t+1] = owed*(1 + rate) - paid[t+1]", { inputs: ["paid"] }).inputs';
    expect((await kernel.run(good)).value).toBe("[ 'paid' ]");
    const unknown = 'recurrence("N[t+1] = N + r*N*(1 - N/capcity)", { parameters: ["r", "capacity"] })';
    expect((await kernel.run(unknown)).reply["evalue"]).toContain("capcity");
  });

  test("is not checked in advance when its options are computed", async () => {
    const code = 'const inputs = ["paid"];\nrecurrence("owed[t+1] = owed - paid[t+1]", { inputs }).states';
    expect((await kernel.run(code)).value).toBe("[ 'owed' ]");
  });
});
