import { spawnSync } from "node:child_process";
import {
  cpSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  symlinkSync,
  writeFileSync,
} from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { runNotebook } from "../../src/casework/index.js";
import { kernelCommand, plain, root, testFolder } from "../kernel/kernel-in-test.js";

// Source: nbformat 4.5 (format of outputs and cells); Jupyter client documentation, "Messaging in Jupyter" (how
// displays, updates and clears make up what is kept). What the runner writes and when is our promise.
const program = join(root, "dist/src/cli/main.js");

interface StoredCell {
  readonly id: string;
  readonly source: readonly string[];
  readonly outputs: readonly Readonly<Record<string, unknown>>[];
  readonly execution_count: number | null;
}

function notebookIn(folder: string, name: string, sources: readonly string[]): string {
  const cells = sources.map((source, i) => ({
    id: `c${i}`,
    cell_type: "code",
    metadata: {},
    source,
    outputs: [],
  }));
  const path = join(folder, name);
  writeFileSync(path, JSON.stringify({ nbformat: 4, nbformat_minor: 5, metadata: {}, cells }));
  return path;
}

function stored(path: string): readonly StoredCell[] {
  return JSON.parse(readFileSync(path, "utf8")).cells;
}

describe("a notebook run without a front end", () => {
  test("stores what a front end would store", async () => {
    const folder = testFolder();
    const path = notebookIn(folder, "kept.ipynb", [
      'console.log("a"); console.log("b"); console.error("c");',
      'const shown = display({ "text/plain": "first" }, { display_id: "d" });',
      'display({ "text/plain": "gone" }); clearOutput(true); display({ "text/plain": "stays" });',
      'shown.update({ "text/plain": "second" }); 6 * 7',
    ]);
    const run = await runNotebook(path, { kernel: kernelCommand });
    expect(run).toMatchObject({ kind: "completed", answer: undefined });
    const [streams, updated, cleared, valued] = stored(join(folder, "out", "kept.ipynb"));
    expect(streams?.outputs).toEqual([
      { output_type: "stream", name: "stdout", text: "a\nb\n" },
      { output_type: "stream", name: "stderr", text: "c\n" },
    ]);
    expect(updated?.outputs).toEqual([
      { output_type: "display_data", data: { "text/plain": "second" }, metadata: {} },
    ]);
    expect(cleared?.outputs).toEqual([
      { output_type: "display_data", data: { "text/plain": "stays" }, metadata: {} },
    ]);
    expect(valued).toMatchObject({
      execution_count: 4,
      outputs: [{ data: { "text/plain": "42" }, execution_count: 4 }],
    });
    expect(readFileSync(join(folder, "out", "kept.html"), "utf8")).toContain("<!doctype html>");
  });

  test("stops at an error, reports it, and keeps the files of an earlier run", async () => {
    const folder = testFolder();
    const path = notebookIn(folder, "case.ipynb", ["1 + 1"]);
    await runNotebook(path, { kernel: kernelCommand });
    const before = readFileSync(join(folder, "out", "case.ipynb"), "utf8");
    notebookIn(folder, "case.ipynb", ["1 + 1", 'throw new RangeError("owed is negative");', "3"]);
    const run = await runNotebook(path, { kernel: kernelCommand });
    expect(run).toMatchObject({
      kind: "failed",
      failure: { cell: 2, ename: "RangeError", evalue: "owed is negative" },
    });
    expect(readFileSync(join(folder, "out", "case.ipynb"), "utf8")).toBe(before);
    expect(readdirSync(join(folder, "out"))).toEqual(["case.html", "case.ipynb"]);
  });

  test("takes other values for its top-level constants", async () => {
    const folder = testFolder();
    const path = notebookIn(folder, "case.ipynb", [
      'const rate: number = 0.05, lender = "A";',
      "[rate * 2, lender]",
    ]);
    await runNotebook(path, { kernel: kernelCommand, set: { rate: "0.25", lender: "the savings bank" } });
    const [first, second] = stored(join(folder, "out", "case.ipynb"));
    expect(first?.source.join("")).toBe('const rate: number = 0.25, lender = "the savings bank";');
    expect(second?.outputs[0]).toMatchObject({ data: { "text/plain": "[ 0.5, 'the savings bank' ]" } });
    await expect(runNotebook(path, { kernel: kernelCommand, set: { rat: "1" } })).rejects.toMatchObject({
      code: "unknown-setting",
      message: expect.stringContaining("Names that can be set: rate, lender."),
    });
  });

  test("rejects files that are not notebooks", async () => {
    const folder = testFolder({ "no.ipynb": "no" });
    const refused = { code: "unreadable-notebook" };
    await expect(runNotebook(join(folder, "no.ipynb"), { kernel: kernelCommand })).rejects.toMatchObject(
      refused,
    );
    await expect(runNotebook(join(folder, "none.ipynb"), { kernel: kernelCommand })).rejects.toMatchObject(
      refused,
    );
  });

  test("reports that its kernel ended", async () => {
    const path = notebookIn(testFolder(), "case.ipynb", ["process.exit(3)"]);
    await expect(runNotebook(path, { kernel: kernelCommand })).rejects.toMatchObject({
      code: "kernel-ended",
    });
  });
});

describe("the command line", () => {
  const run = (...words: readonly string[]) =>
    spawnSync(process.execPath, [program, ...words], { encoding: "utf8" });

  test("prints name, answer and page, and the failed cell with status 1", () => {
    const folder = testFolder();
    const sentence =
      'display({ "text/plain": "x", "application/vnd.periodwise.answer+json": { sentence: "It is 42." } })';
    const good = notebookIn(folder, "good.ipynb", [sentence]);
    const bad = notebookIn(folder, "bad.ipynb", ["1", 'const owed: number = "much";']);
    const done = run("run", good, bad);
    expect(done.status).toBe(1);
    expect(done.stdout).toBe(`good.ipynb: It is 42. [${join(folder, "out", "good.html")}]\n`);
    expect(plain(done.stderr)).toMatch(/^bad\.ipynb: code cell 2 failed with TypeCheckError: Type 'string'/);
    expect(done.stderr.match(/is not assignable/g)).toHaveLength(1);
  });

  test("names unknown commands and options and missing arguments, with status 2", () => {
    const misuse = (message: string) => ({ status: 2, stderr: expect.stringContaining(message) });
    expect(run("rn")).toMatchObject(misuse('Unknown command "rn". Did you mean "run"?'));
    expect(run("run", "a.ipynb", "--ot", "b")).toMatchObject(misuse("Unknown option --ot."));
    expect(run("run", "a.ipynb", "--out")).toMatchObject(misuse("Option --out needs a value"));
    expect(run("run")).toMatchObject(misuse("Give a notebook: periodwise run <notebook...>"));
  });

  test("prints help and version", () => {
    const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
    for (const word of ["help", "--help", "-h"])
      expect(run(word)).toMatchObject({ status: 0, stdout: expect.stringContaining("Usage: periodwise") });
    for (const word of ["--version", "-v"])
      expect(run(word)).toMatchObject({ status: 0, stdout: `${version}\n` });
  });

  test("says when a notebook is missing", () => {
    const done = run("run", join(testFolder(), "none.ipynb"));
    expect(done.status).toBe(1);
    expect(done.stderr).toMatch(/^none\.ipynb: Notebook ".*" not found\. Give the path of an \.ipynb file/);
  });
});

test("a package installed in another folder runs a notebook there", { timeout: 120_000 }, () => {
  const folder = testFolder({ "record.csv": "month,owed\n0,1200\n1,1100\n2,1000\n" });
  const packages = join(folder, "node_modules");
  const own = join(packages, "periodwise");
  mkdirSync(own, { recursive: true });
  for (const name of readdirSync(join(root, "node_modules"))) {
    if (!existsSync(join(packages, name)) && !name.startsWith("."))
      symlinkSync(join(root, "node_modules", name), join(packages, name));
  }
  cpSync(join(root, "package.json"), join(own, "package.json"));
  cpSync(join(root, "dist"), join(own, "dist"), { recursive: true });
  const path = notebookIn(folder, "case.ipynb", [
    'import { readRecord } from "periodwise";\nconst table = await readRecord("record.csv");',
    "const rows: number | undefined = table.shape[0]; rows",
  ]);
  const words = [join(own, "dist/src/cli/main.js"), "run", path];
  const done = spawnSync(process.execPath, words, { encoding: "utf8", cwd: folder });
  expect(done.stderr).toBe("");
  expect(stored(join(folder, "out", "case.ipynb"))[1]?.outputs[0]).toMatchObject({
    data: { "text/plain": "3" },
  });
});
