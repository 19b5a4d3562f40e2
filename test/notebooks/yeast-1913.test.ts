// The whole path of a case on a published record, through our own kernel and the runner.
// Expected values: R 4.2.2 (nls and profiles of the sum of squares) on the record named in data/SOURCE.md, rounded
// as the tables round them: an estimate so that its standard error shows two digits.
import { spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, expect, test } from "vitest";

const root = join(import.meta.dirname, "..", "..");
const out = mkdtempSync(join(tmpdir(), "periodwise-yeast-"));
let printed = "";
let shown = "";

beforeAll(() => {
  const program = join(root, "dist", "src", "cli", "main.js");
  const notebook = join(import.meta.dirname, "yeast-1913.ipynb");
  const done = spawnSync(process.execPath, [program, "run", notebook, "--out", out], { encoding: "utf8" });
  expect(done.stderr).toBe("");
  printed = done.stdout;
  const { cells } = JSON.parse(readFileSync(join(out, "yeast-1913.ipynb"), "utf8")) as {
    cells: { outputs?: { data?: Record<string, string | string[]> }[] }[];
  };
  shown = cells
    .flatMap((cell) => cell.outputs ?? [])
    .map((output) => [output.data?.["text/plain"] ?? ""].flat().join(""))
    .join("\n");
});

afterAll(() => rmSync(out, { recursive: true, force: true }));

test("the capacity is 663.0 with a standard error of 1.7 and a profile interval from 659.4 to 666.7", () => {
  expect(shown).toMatch(/\bK\b.*663\.0.*1\.7\b.*659\.4.*666\.7/);
});

test("the record supports the sampled logistic against the quadratic rule", () => {
  // AIC of the two: 106.10 and, by its sum of squares 1353.52 with the same counts, 142.97.
  expect(shown).toContain('The record supports "N[t+1] = R*N/(1 + (R - 1)*N/K)"');
});

test("the amount is carried forward to 661.6 at hour 19 and 662.9 at hour 24", () => {
  expect(shown).toMatch(/\b19\b.*661\.6/);
  expect(shown).toMatch(/\b24\b.*662\.9/);
});

test("the runner prints the answer and the path of the page, and the page is self-contained", () => {
  expect(printed).toContain("yeast-1913.ipynb: ");
  expect(printed).toContain("reaches 650");
  const page = readFileSync(join(out, "yeast-1913.html"), "utf8");
  expect(page).toContain("reaches 650");
  expect(page).toContain("decisions should be confirmed with a person licensed or competent");
  expect(page).not.toMatch(/<(script|img|link)[^>]+(src|href)="https?:/);
});
