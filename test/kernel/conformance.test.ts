import { mkdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { installSpecification } from "../../src/casework/index.js";
import { kernelCommand, testFolder } from "./kernel-in-test.js";
import { isThere } from "./needed-program.js";
import { ran } from "./ran.js";

// Source: Jupyter client documentation, "Messaging in Jupyter", protocol 5.4, driven by Debian's own client
// library (jupyter_client). The checks are ours; one test here is one of them.
const python = "/usr/bin/python3";
const checks = 59;

interface Row {
  readonly name: string;
  readonly status: string;
  readonly why: string;
}

async function outcomes(): Promise<readonly Row[]> {
  const folder = testFolder();
  const report = join(folder, "report.json");
  installSpecification(folder, kernelCommand);
  mkdirSync(join(folder, "cells"));
  const script = join(import.meta.dirname, "conformance", "wire-checks.py");
  const env = { ...process.env, JUPYTER_PATH: folder, KERNEL_CWD: join(folder, "cells") };
  await ran(python, [script, "periodwise", "--json", report], { env });
  const rows = JSON.parse(readFileSync(report, "utf8")) as readonly [string, string, string][];
  return rows.map(([name, status, why]) => ({ name, status, why }));
}

const canRun = isThere(python, "-c", "import jupyter_client");
const rows = canRun ? await outcomes() : [];

test.skipIf(!canRun)("every check was made", () => {
  expect(rows).toHaveLength(checks);
});

test.each(rows)("$name", ({ status, why }) => {
  expect(status, why).toBe("PASS");
});
