import { createRequire } from "node:module";
import { join } from "node:path";
import type ts from "typescript-cell";
import { expect, test } from "vitest";
import { compilerPath } from "../../src/kernel/cells/compiler-library.js";
import { withHints } from "../../src/kernel/cells/type-hints.js";
import { root } from "./kernel-in-test.js";

const compiler = createRequire(import.meta.url)(compilerPath) as typeof ts;

/** What the compiler of cells says of a cell, with the hints. */
function complaints(code: string): readonly string[] {
  const name = join(root, "test", "cells", "typed-hint.ts");
  const options: ts.CompilerOptions = {
    strict: true,
    noEmit: true,
    skipLibCheck: true,
    types: ["node"],
    target: compiler.ScriptTarget.ES2022,
    module: compiler.ModuleKind.CommonJS,
    moduleResolution: compiler.ModuleResolutionKind.Node10,
    baseUrl: root,
    paths: { periodwise: ["dist/kernel-helpers/index.d.ts"] },
  };
  const host = compiler.createCompilerHost(options);
  const { getSourceFile, fileExists } = host;
  host.fileExists = (file) => file === name || fileExists(file);
  host.getSourceFile = (file, ...rest) =>
    file === name ? compiler.createSourceFile(file, code, rest[0], true) : getSourceFile(file, ...rest);
  const program = compiler.createProgram([name], options, host);
  const found = compiler.getPreEmitDiagnostics(program, program.getSourceFile(name));
  return withHints(compiler, program, found).map(({ messageText }) =>
    compiler.flattenDiagnosticMessageText(messageText, "\n"),
  );
}

const before = `
import { fit, observations, recurrence, simulate } from "periodwise";
const rule = recurrence("N[t+1] = R*N");
const counts = observations({ t: [0, 1], N: [1, 2] }, { period: "t", step: "week", value: "N" });
`;

test("a field of one of several forms is named once, with all its choices", () => {
  const [told = ""] = complaints(
    `${before}simulate(rule, { periods: 3, noise: { N: { distribution: "normal", sdd: 3 } } });`,
  );
  const fields = /Available fields: (.*)\./.exec(told)?.[1] ?? "";
  expect(fields.match(/distribution/g)).toHaveLength(1);
  expect(fields.match(/\bsd\b/g)).toHaveLength(1);
  for (const choice of ["normal", "lognormal", "poisson", "negative-binomial", "demographic"])
    expect(fields).toContain(`"${choice}"`);
});

test("a result of another function is not listed by its fields", () => {
  const [told = ""] = complaints(`${before}fit({ text: "N[t+1] = R*N" }, counts, { errors: "process" });`);
  expect(told).toContain("A Rule is the result of another function.");
  expect(told).not.toContain("Available fields");
});
