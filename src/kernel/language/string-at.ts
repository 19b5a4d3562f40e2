import type ts from "typescript-cell";
import { literalValue } from "./literal-value.js";
import type { StringLanguage } from "./string-language.js";

/** A string of a cell that is written in one of the registered languages. */
export interface LanguageString {
  readonly language: StringLanguage;
  /** The text between the quotes. Strings with escapes or substitutions are ignored. */
  readonly text: string;
  /** Its start in the cell, in UTF-16 units. */
  readonly start: number;
  /** The arguments after it, as far as they are literals. */
  readonly others: readonly unknown[];
}

/** All strings of a cell that are in a registered language, in order. */
export function languageStrings(
  library: typeof ts,
  languages: readonly StringLanguage[],
  cell: string,
): readonly LanguageString[] {
  if (languages.length === 0) return [];
  const file = library.createSourceFile("cell.ts", cell, library.ScriptTarget.ES2022);
  const found: LanguageString[] = [];
  const visit = (node: ts.Node): void => {
    if (library.isCallExpression(node)) {
      for (const index of node.arguments.keys()) {
        const callee = node.expression.getText(file);
        const language = languages.find((one) => one.matches(callee, index));
        if (language !== undefined)
          found.push(...stringsOf(library, language, node.arguments.slice(index), file));
      }
    }
    library.forEachChild(node, visit);
  };
  visit(file);
  return found;
}

/** The string of a registered language around the position. */
export function stringAt(
  library: typeof ts,
  languages: readonly StringLanguage[],
  cell: string,
  position: number,
): LanguageString | undefined {
  return languageStrings(library, languages, cell).find(
    ({ start, text }) => start <= position && position <= start + text.length,
  );
}

function stringsOf(
  library: typeof ts,
  language: StringLanguage,
  [argument, ...following]: readonly ts.Expression[],
  file: ts.SourceFile,
): readonly LanguageString[] {
  if (argument === undefined || !library.isStringLiteralLike(argument)) return [];
  const start = argument.getStart(file) + 1;
  // A string still being typed has no closing quote yet.
  const closed = argument.end - start >= argument.text.length + 1;
  const text = file.text.slice(start, closed ? argument.end - 1 : argument.end);
  const others = following.map((one) => literalValue(library, one));
  return text === argument.text ? [{ language, text, start, others }] : [];
}
