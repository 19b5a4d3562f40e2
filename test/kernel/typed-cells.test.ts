import { readdirSync } from "node:fs";
import { createRequire } from "node:module";
import { join } from "node:path";
import type ts from "typescript-cell";
import { describe, expect, test } from "vitest";
import { compilerPath } from "../../src/kernel/cells/compiler-library.js";
import { root } from "./kernel-in-test.js";

// Source: TypeScript 5.0.4 itself, which checks cells, with library checks on: a declaration it cannot read would
// silently become `any` in a cell.
const compiler = createRequire(import.meta.url)(compilerPath) as typeof ts;
const folder = join(root, "test", "cells");

function complaints(): readonly ts.Diagnostic[] {
  const samples = readdirSync(folder).filter((name) => name.endsWith(".ts"));
  const program = compiler.createProgram(
    samples.map((name) => join(folder, name)),
    {
      strict: true,
      noEmit: true,
      skipLibCheck: false,
      types: ["node"],
      target: compiler.ScriptTarget.ES2022,
      module: compiler.ModuleKind.CommonJS,
      moduleResolution: compiler.ModuleResolutionKind.Node10,
      baseUrl: root,
      paths: { periodwise: ["dist/kernel-helpers/index.d.ts"] },
    },
  );
  return compiler.getPreEmitDiagnostics(program);
}

describe("with the compiler of cells", () => {
  const all = complaints();
  const told = (wanted: (path: string) => boolean): readonly string[] =>
    all
      .filter(({ file }) => file !== undefined && wanted(file.fileName))
      .map(
        ({ file, messageText }) =>
          `${file?.fileName}: ${compiler.flattenDiagnosticMessageText(messageText, " ")}`,
      );

  test("sample cells compile, and fail where they say so", () => {
    expect(told((path) => path.startsWith(folder))).toEqual([]);
  });

  test("the declarations of the package can be read", () => {
    expect(told((path) => path.startsWith(join(root, "dist")))).toEqual([]);
  });

  test("it is the compiler that package.json pins", () => {
    expect(compiler.version).toBe("5.0.4");
  });
});
