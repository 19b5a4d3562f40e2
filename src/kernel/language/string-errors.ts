import type ts from "typescript-cell";
import { CellError, type Complaint } from "../cells/cell-error.js";
import type { Place } from "../cells/source-places.js";
import { languageStrings } from "./string-at.js";
import type { StringLanguage } from "./string-language.js";

/** Checks the strings of a cell that are in a registered language, before the cell runs. */
export function stringErrors(
  library: typeof ts,
  languages: readonly StringLanguage[],
  cell: string,
): { readonly kind: "failed"; readonly cause: CellError } | undefined {
  const complaints = languageStrings(library, languages, cell).flatMap(
    ({ language, text, start: at, others }) =>
      language.check(text, others).map(
        ({ start, end, text: told }): Complaint => ({
          text: told,
          isSyntax: true,
          start: placeAt(cell, at + start),
          end: placeAt(cell, at + end),
        }),
      ),
  );
  return complaints.length === 0 ? undefined : { kind: "failed", cause: new CellError(complaints) };
}

function placeAt(text: string, position: number): Place {
  const before = text.slice(0, position).split("\n");
  return { line: before.length, column: (before.at(-1) ?? "").length + 1 };
}
