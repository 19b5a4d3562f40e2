import type ts from "typescript-cell";
import { type CellDiagnostic, CellError } from "../cells/cell-error.js";
import type { Position } from "../cells/source-positions.js";
import { languageStrings } from "./string-at.js";
import type { StringLanguage } from "./string-language.js";

/** Checks the strings of a cell that are in a registered language, before the cell runs. */
export function stringErrors(
  library: typeof ts,
  languages: readonly StringLanguage[],
  cell: string,
): { readonly kind: "failed"; readonly cause: CellError } | undefined {
  const diagnostics = languageStrings(library, languages, cell).flatMap(
    ({ language, text, start: at, others }) =>
      language.check(text, others).map(
        ({ start, end, text: message }): CellDiagnostic => ({
          text: message,
          isSyntax: true,
          start: positionAt(cell, at + start),
          end: positionAt(cell, at + end),
        }),
      ),
  );
  return diagnostics.length === 0 ? undefined : { kind: "failed", cause: new CellError(diagnostics) };
}

function positionAt(text: string, position: number): Position {
  const before = text.slice(0, position).split("\n");
  return { line: before.length, column: (before.at(-1) ?? "").length + 1 };
}
