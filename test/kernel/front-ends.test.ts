import { copyFileSync, cpSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { installSpecification } from "../../src/casework/index.js";
import { kernelCommand, plain, root, testFolder } from "./kernel-in-test.js";
import { isThere } from "./needed-program.js";
import { ran } from "./ran.js";

// Source: Debian's own programs (jupyter nbconvert, jupyter console) drive the kernel as their users do.
const notebooks = join(root, "notebooks");
const worked = readdirSync(notebooks).filter((name) => name.endsWith(".ipynb"));
const jupyter = "/usr/bin/jupyter";
const python = "/usr/bin/python3";

function placeForCases(): { readonly folder: string; readonly env: NodeJS.ProcessEnv } {
  const folder = testFolder();
  installSpecification(folder, kernelCommand);
  cpSync(join(notebooks, "data"), join(folder, "data"), { recursive: true });
  for (const name of worked) copyFileSync(join(notebooks, name), join(folder, name));
  const env = {
    ...process.env,
    JUPYTER_PATH: folder,
    JUPYTER_CONFIG_DIR: join(folder, "config"),
    HOME: folder,
  };
  return { folder, env };
}

describe.skipIf(!isThere(python, "-m", "nbconvert", "--version"))("jupyter nbconvert", () => {
  const { folder, env } = placeForCases();
  test.each(worked)("executes %s", { timeout: 300_000 }, async (name) => {
    const words = ["-m", "nbconvert", "--to", "notebook", "--execute", "--output", `done-${name}`, name];
    const done = await ran(python, words, { cwd: folder, env });
    expect(done.status, done.stderr).toBe(0);
    const executed = JSON.parse(readFileSync(join(folder, `done-${name}`), "utf8"));
    const types = executed.cells.flatMap(
      (cell: { outputs?: { output_type: string; data?: object }[] }) => cell.outputs ?? [],
    );
    expect(types.some((output: { output_type: string }) => output.output_type === "error")).toBe(false);
    const answers = types.filter(
      (output: { data?: object }) => "application/vnd.periodwise.answer+json" in (output.data ?? {}),
    );
    expect(answers.length).toBeGreaterThan(0);
  });
});

describe.skipIf(!isThere(jupyter, "console", "--version"))("jupyter console", () => {
  test("runs what is typed into it", { timeout: 120_000 }, async () => {
    const { folder, env } = placeForCases();
    const input = "const owed = 1200\nowed * 2\nexit\n";
    const words = ["console", "--kernel", "periodwise", "--simple-prompt"];
    const done = await ran(jupyter, words, { cwd: folder, env, input });
    expect(plain(done.stdout), done.stderr).toContain("2400");
  });

  /** A notebook's cells as they are typed here: a line each, the line breaks of a rule's text written out. */
  const typed = (name: string): string =>
    JSON.parse(readFileSync(join(notebooks, name), "utf8"))
      .cells.filter((cell: { cell_type: string }) => cell.cell_type === "code")
      .map((cell: { source: string[] }) =>
        cell.source
          .join("")
          .replace(/`[^`]*`/g, (text) => text.replaceAll("\n", "\\n"))
          .replaceAll("\n", " "),
      )
      .join("\n");

  test.each(worked)("runs %s cell by cell", { timeout: 300_000 }, async (name) => {
    const { folder, env } = placeForCases();
    const words = ["console", "--kernel", "periodwise", "--simple-prompt"];
    const done = await ran(jupyter, words, { cwd: folder, env, input: `${typed(name)}\nexit\n` });
    expect(plain(done.stdout), done.stderr).toContain("Answer: ");
  });
});
