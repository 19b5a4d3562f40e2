import { describe, expect, test } from "vitest";
import { plain, testFolder, testKernel } from "./kernel-in-test.js";

const folder = testFolder({
  "due.ts":
    'export function due(owed: number): number {\n  if (owed < 0) throw new RangeError("owed is negative");\n  return owed;\n}\n',
});
const kernel = await testKernel(folder);

async function traceback(code: string): Promise<string> {
  const { reply } = await kernel.run(code, { store_history: false });
  return (reply["traceback"] as readonly string[]).map(plain).join("\n");
}

// The form is ours; that an error must point at its line and column is common practice, no source.
describe("a traceback", () => {
  test("points at a type error over its whole width", async () => {
    expect(await traceback("const rate = 0.05;\nconst wrong: string = rate;")).toMatchInlineSnapshot(`
      "TypeCheckError: Type 'number' is not assignable to type 'string'.
      in this cell, line 2
        1 | const rate = 0.05;
      > 2 | const wrong: string = rate;
          |       ^^^^^"
    `);
  });

  test("points at a syntax error", async () => {
    expect(await traceback("const = 3;")).toMatchInlineSnapshot(`
      "SyntaxError: Variable declaration expected.
      in this cell, line 1
      > 1 | const = 3;
          |       ^
      Variable declaration expected.
      in this cell, line 1
      > 1 | const = 3;
          |         ^"
    `);
  });

  test("follows the calls in the lines of the cell, from the throw outwards", async () => {
    const code =
      "const pad: number = 1;\n\nfunction inner(): never {\n  throw new Error('at line four');\n}\ninner()";
    expect(await traceback(code)).toMatchInlineSnapshot(`
      "Error: at line four
      in this cell, line 4
        2 | 
        3 | function inner(): never {
      > 4 |   throw new Error('at line four');
          |         ^
        5 | }
        6 | inner()
      called from this cell, line 6
        4 |   throw new Error('at line four');
        5 | }
      > 6 | inner()
          | ^"
    `);
  });

  test("follows the calls into a file beside the notebook", async () => {
    expect(
      await traceback('import { due } from "./due";\nawait Promise.resolve();\ndue(-1)'),
    ).toMatchInlineSnapshot(`
      "RangeError: owed is negative
      in due.ts, line 2
        1 | export function due(owed: number): number {
      > 2 |   if (owed < 0) throw new RangeError("owed is negative");
          |                       ^
        3 |   return owed;
        4 | }
      called from this cell, line 3
        1 | import { due } from "./due";
        2 | await Promise.resolve();
      > 3 | due(-1)
          |    ^"
    `);
  });

  test("shows the lines of an earlier cell whose function fails later", async () => {
    await kernel.run(
      "// a comment\nfunction late(n: number): number {\n  if (n > 1) throw new Error('late');\n  return n;\n}",
    );
    expect(await traceback("late(2)")).toMatch(/in cell \d+, line 3\n.*called from this cell, line 1/s);
  });

  test("names the cause of an error", async () => {
    expect(await traceback("throw new Error('outer', { cause: new TypeError('inner') })")).toContain(
      "caused by TypeError: inner",
    );
  });

  test("of a type error says what to write instead", async () => {
    await kernel.run(
      'type Plan = "level" | "falling";\ninterface Terms { plan: Plan; rate?: number; months?: number }\n' +
        "function due(owed: number, terms: Terms): number { return owed * (terms.rate ?? 1); }",
    );
    expect(await traceback('due(1, { plan: "rising" })')).toContain('Allowed values: "level", "falling".');
    expect(await traceback('due(1, { plan: "level", month: 3 })')).toContain(
      'Available fields: months, plan: "level" | "falling", rate.',
    );
    expect(await traceback("due(1)")).toContain(
      'Argument `terms` is missing: Terms with plan: "level" | "falling".',
    );
  });

  // Advice on project settings is of no use in a notebook, which has none.
  test.each([
    [
      'import { line } from "d3-shape";',
      "Install the package in the folder of the notebook: npm install d3-shape",
    ],
    ['import { a } from "@scope/name/part";', "npm install @scope/name"],
    ['import { a } from "./missing";', 'There is no file "./missing" beside the notebook.'],
    ["print(3)", "To print, write console.log(...)."],
    ["const owed = 2,000;", "Write numbers without thousands separators: 2000."],
    ['import { due } from "./due.ts";', 'Leave out the extension, as in: import { rate } from "./rates".'],
  ])("of %s says what to do", async (code, advice) => {
    expect(await traceback(code)).toContain(advice);
  });

  test("does not advise to change compiler options", async () => {
    const newer = await traceback("[1, 2].toSorted()");
    expect(newer).toContain("Property 'toSorted' does not exist");
    expect(newer).not.toContain("compiler option");
  });

  test("lists the errors of an AggregateError", async () => {
    const code = "throw new AggregateError([new Error('first'), new RangeError('second')], 'two failed');";
    expect(await traceback(code)).toMatch(
      /AggregateError: two failed[\s\S]*- Error: first\n- RangeError: second/,
    );
  });

  test("of an error with facts omits its cause", async () => {
    const code = 'throw Object.assign(new Error("said", { cause: new Error("inner") }), { facts: {} });';
    expect(await traceback(code)).not.toContain("caused by");
  });

  test("is given for any thrown value", async () => {
    for (const thrown of [
      "'text'",
      "null",
      "undefined",
      "{ a: 1 }",
      "Symbol('s')",
      "new Proxy({}, { get() { throw 1; } })",
    ]) {
      const { reply } = await kernel.run(`throw ${thrown};`);
      expect(reply["status"], thrown).toBe("error");
      expect(typeof reply["ename"], thrown).toBe("string");
    }
  });
});
