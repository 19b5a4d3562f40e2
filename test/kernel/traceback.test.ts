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
  test("points at the place of a type error, as wide as the compiler says", async () => {
    expect(await traceback("const rate = 0.05;\nconst wrong: string = rate;")).toMatchInlineSnapshot(`
      "TypeCheckError: Type 'number' is not assignable to type 'string'.
      in this cell, line 2
        1 | const rate = 0.05;
      > 2 | const wrong: string = rate;
          |       ^^^^^"
    `);
  });

  test("points at a mistake of syntax", async () => {
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

  test("leads from the throw through the calls, in the lines of the cell", async () => {
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

  test("leads into a file beside the notebook and back to the cell", async () => {
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

  test("keeps the lines of an earlier cell whose function fails later", async () => {
    await kernel.run(
      "// a comment\nfunction late(n: number): number {\n  if (n > 1) throw new Error('late');\n  return n;\n}",
    );
    expect(await traceback("late(2)")).toMatch(/in cell \d+, line 3\n.*called from this cell, line 1/s);
  });

  test("names the cause of an error", async () => {
    expect(await traceback("throw new Error('outer', { cause: new TypeError('inner') })")).toContain(
      "because of TypeError: inner",
    );
  });

  test("of a type error says what could stand there instead", async () => {
    await kernel.run(
      'type Plan = "level" | "falling";\ninterface Terms { plan: Plan; rate?: number; months?: number }\n' +
        "function due(owed: number, terms: Terms): number { return owed * (terms.rate ?? 1); }",
    );
    expect(await traceback('due(1, { plan: "rising" })')).toContain('It can be "level", "falling".');
    expect(await traceback('due(1, { plan: "level", month: 3 })')).toContain(
      'The fields there are months, plan: "level" | "falling", rate.',
    );
    expect(await traceback("due(1)")).toContain(
      'The argument "terms" is missing: Terms, which must have plan: "level" | "falling".',
    );
  });

  test("of an error that carries its facts leaves its cause out", async () => {
    const code = 'throw Object.assign(new Error("said", { cause: new Error("inner") }), { facts: {} });';
    expect(await traceback(code)).not.toContain("because of");
  });

  test("is there for whatever is thrown", async () => {
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
