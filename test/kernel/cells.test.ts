import { describe, expect, test } from "vitest";
import { testFolder, testKernel, writeInto } from "./kernel-in-test.js";

const esOnly = {
  "package.json":
    '{ "name": "only-import", "type": "module", "exports": { "import": "./index.js", "types": "./index.d.ts" } }',
  "index.js": "export const fee = 12; export default (n) => n * 2;\n",
  "index.d.ts": "export const fee: number; export default function double(n: number): number;\n",
};
const folder = testFolder({
  "rates.ts": "export const rate: number = 0.05;\n",
  "fees.ts": 'import { rate } from "./rates";\nexport const fee = (owed: number): number => owed * rate;\n',
  "record.csv": "month,owed\n0,1200\n1,1100\n2,1000\n",
  ...Object.fromEntries(
    Object.entries(esOnly).map(([name, text]) => [`node_modules/only-import/${name}`, text]),
  ),
});
const kernel = await testKernel(folder);

// Source of what is expected here: the language's own rules (ECMAScript, TypeScript handbook) and the duties of a
// notebook kernel; common practice where a notebook departs from a module (redeclaring, top-level values).
describe("a cell", () => {
  test("shows the value of its last expression, unless it is undefined", async () => {
    expect((await kernel.run("6 * 7")).value).toBe("42");
    expect((await kernel.run("void 0")).value).toBeUndefined();
  });

  test("can redeclare a name of an earlier cell with another type", async () => {
    await kernel.run("const level = 1;");
    await kernel.run("function level() { return 'a function'; }");
    expect((await kernel.run("class level { size = 3 }\nnew level().size")).value).toBe("3");
    expect((await kernel.run("let level: string = 'text'; level")).value).toBe("'text'");
  });

  test("has top-level await", async () => {
    expect((await kernel.run("await Promise.resolve(7)")).value).toBe("7");
    const loop =
      "const seen: number[] = [];\nfor await (const n of [1, Promise.resolve(2)]) seen.push(n);\nseen";
    expect((await kernel.run(loop)).value).toBe("[ 1, 2 ]");
  });

  test("is type-checked strictly", async () => {
    const { reply } = await kernel.run("function f(x) { return x; }");
    expect(reply).toMatchObject({ status: "error", ename: "TypeCheckError" });
    expect(reply["evalue"]).toContain("implicitly has an 'any' type");
    expect(
      (await kernel.run("const owed: string | undefined = undefined; owed.length")).reply["status"],
    ).toBe("error");
  });

  test("finds the bundled packages, typed, in a folder without them", async () => {
    const typed = await kernel.run(
      'import { recurrence } from "periodwise";\nconst n: number = recurrence("N[t+1] = R*N");',
    );
    expect(typed.reply["evalue"]).toMatch(/Type '.*Rule.*' is not assignable to type 'number'/);
    const frame = await kernel.run(
      'import { DataFrame } from "danfojs-node";\nconst wrong: number = new DataFrame([[1]]).shape;',
    );
    expect(frame.reply["evalue"]).toBe("Type 'number[]' is not assignable to type 'number'.");
  });

  test("keeps a value whose type comes from a package that the folder does not have", async () => {
    const made = await kernel.run(
      'import { readRecord } from "periodwise";\nconst table = await readRecord("record.csv");',
    );
    expect(made.reply["evalue"]).toBeUndefined();
    expect((await kernel.run("table.shape")).value).toBe("[ 3, 2 ]");
    expect((await kernel.run("const no: string = table.shape;")).reply["status"]).toBe("error");
  });

  test("imports a package beside the notebook that only `import` can load", async () => {
    const { value, stderr } = await kernel.run(
      'import double, { fee } from "only-import";\n[double(4), fee]',
    );
    expect(value).toBe("[ 8, 12 ]");
    expect(stderr).toBe("");
    expect(
      (await kernel.run('import { fee as f } from "only-import";\nconst s: string = f;')).reply["status"],
    ).toBe("error");
  });

  test("imports Node modules, typed", async () => {
    expect((await kernel.run('import { basename } from "node:path";\nbasename("a/b.csv")')).value).toBe(
      "'b.csv'",
    );
    expect((await kernel.run("process.pid > 0 && Buffer.from('a').length")).value).toBe("1");
  });

  test("sees the current contents of a file beside the notebook", async () => {
    const code = 'import { fee } from "./fees";\nfee(100)';
    expect((await kernel.run(code)).value).toBe("5");
    writeInto(folder, "rates.ts", "export const rate: number = 0.07;\n\n");
    expect((await kernel.run(code)).value).toBe("7.000000000000001");
  });

  test("finds a file that was created after a first failed import", async () => {
    const code = 'import { late } from "./late";\nlate';
    expect((await kernel.run(code)).reply["status"]).toBe("error");
    writeInto(folder, "late.ts", 'export const late = "here";\n');
    expect((await kernel.run(code)).value).toBe("'here'");
  });

  test("that fails keeps earlier values, even of names it redeclares", async () => {
    await kernel.run("let kept = 1; const name = 'before';");
    const { reply } = await kernel.run("kept = 2;\nconst name = 5;\nthrow new Error('stop');");
    expect(reply["status"]).toBe("error");
    expect((await kernel.run("[kept, name]")).value).toBe("[ 2, 'before' ]");
    expect((await kernel.run("name.toUpperCase()")).value).toBe("'BEFORE'");
  });

  test("can use names of its own for the globals of the kernel", async () => {
    expect((await kernel.run("const input = 3; const display = input + 1; display")).value).toBe("4");
  });
});
