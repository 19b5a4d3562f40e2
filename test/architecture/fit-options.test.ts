// Outside src/estimate no code reads the options of a fit; it asks the problem of the fit.
import { readFileSync } from "node:fs";
import { join } from "node:path";
import ts from "typescript";
import { beforeAll, expect, test } from "vitest";

const root = join(import.meta.dirname, "..", "..");
const planted = join(root, "src", "projection", "planted.ts");
/** Reads the options of a fit in each way that code here does. */
const violations = `
import type { Fit } from "../estimate/index.js";
export const byMember = (fit: Fit): boolean => fit.options.errors === "process";
export const byPattern = ({ rule, options }: Fit): unknown => [rule, options.distribution];
export function byVariable(fit: Fit): unknown {
  const { options: asked } = fit;
  return asked.groups;
}
export const inside = (ahead: { readonly fit: Fit }): unknown => ahead.fit.options["sd"];
export const plain = (run: { readonly options: { readonly errors: string } }): string => run.options.errors;
`;

let found: readonly string[];

beforeAll(() => {
  const config = ts.readConfigFile(join(root, "tsconfig.json"), (file) => readFileSync(file, "utf8"));
  const { options, fileNames } = ts.parseJsonConfigFileContent(config.config, ts.sys, root);
  const settings = { ...options, noEmit: true, composite: false, incremental: false };
  const host = ts.createCompilerHost(settings, true);
  const { getSourceFile, fileExists } = host;
  host.fileExists = (file) => file === planted || fileExists.call(host, file);
  host.getSourceFile = (file, language, ...rest) =>
    file === planted
      ? ts.createSourceFile(file, violations, language, true)
      : getSourceFile.call(host, file, language, ...rest);
  const program = ts.createProgram([...fileNames, planted], settings, host);
  found = program.getSourceFiles().flatMap((file) => readings(program, file));
}, 120_000);

/** Places in a file that read `options` of a fit. */
function readings(program: ts.Program, file: ts.SourceFile): string[] {
  const checker = program.getTypeChecker();
  const own = file.fileName.startsWith(`${root}/`) ? file.fileName.slice(root.length + 1) : "";
  if (!/^(src|kernel-helpers)\//.test(own) || own.startsWith("src/estimate/")) return [];
  const lines: string[] = [];
  const visit = (node: ts.Node): void => {
    const read = ts.isPropertyAccessExpression(node)
      ? { name: node.name, of: node.expression }
      : ts.isBindingElement(node) && ts.isObjectBindingPattern(node.parent)
        ? { name: node.propertyName ?? node.name, of: node.parent }
        : undefined;
    if (read?.name.getText(file) === "options" && isFit(checker.getTypeAtLocation(read.of)))
      lines.push(`${own}:${file.getLineAndCharacterOfPosition(node.getStart(file)).line + 1}`);
    ts.forEachChild(node, visit);
  };
  visit(file);
  return lines;
}

/** Whether a type has the options of a fit, whatever it is called: the engine's own, or one that extends it. */
function isFit(type: ts.Type): boolean {
  const options = type.getProperty("options")?.declarations?.[0];
  return options?.getSourceFile().fileName === join(root, "src", "estimate", "fit.ts");
}

test("nothing outside src/estimate reads the options of a fit", () => {
  expect(found.filter((place) => !place.includes("planted.ts"))).toEqual([]);
});

test("a planted reading is seen, in each way of writing it", () => {
  expect(found.filter((place) => place.includes("planted.ts")).map((place) => place.split(":")[1])).toEqual([
    "3",
    "4",
    "6",
    "9",
  ]);
});
