/** Docstrings of everything that a notebook can import, and of the fields of its options, as a hover shows them. */
import { join, relative } from "node:path";
import ts from "typescript";

const missing = "(no docstring)";

/** For each exported name and each field of an exported interface: its place and its docstring. */
export function helpTexts(root) {
  const face = join(root, "kernel-helpers", "index.ts");
  const program = ts.createProgram([face], {
    module: ts.ModuleKind.Node20,
    strict: true,
    skipLibCheck: true,
  });
  const checker = program.getTypeChecker();
  const found = [];
  const seen = new Set();
  const note = (symbol, name) => {
    const declaration = symbol.declarations?.[0];
    if (declaration === undefined || seen.has(symbol)) return;
    seen.add(symbol);
    const file = declaration.getSourceFile();
    if (file.fileName.includes("node_modules")) return;
    const line = file.getLineAndCharacterOfPosition(declaration.getStart(file)).line + 1;
    const doc = ts.displayPartsToString(symbol.getDocumentationComment(checker)).replace(/\s*\n\s*/g, " ");
    found.push({ path: relative(root, file.fileName), line, text: `${name}: ${doc || missing}` });
  };
  for (const exported of checker.getExportsOfModule(
    checker.getSymbolAtLocation(program.getSourceFile(face)),
  )) {
    const alias = exported.flags & ts.SymbolFlags.Alias;
    const symbol = alias ? checker.getAliasedSymbol(exported) : exported;
    note(symbol, exported.name);
    if (!(symbol.flags & (ts.SymbolFlags.Interface | ts.SymbolFlags.TypeAlias))) continue;
    const type = checker.getDeclaredTypeOfSymbol(symbol);
    const parts = type.isUnion() ? type.types : [type];
    for (const field of parts.flatMap((part) => checker.getPropertiesOfType(part)))
      note(field, `${exported.name}.${field.name}`);
  }
  return found;
}
