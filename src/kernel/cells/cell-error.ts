import type { Position } from "./source-positions.js";

/** A cell that does not compile; none of it was run. */
export class CellError extends Error {
  override readonly name: "SyntaxError" | "TypeCheckError";
  readonly diagnostics: readonly CellDiagnostic[];

  constructor(diagnostics: readonly CellDiagnostic[]) {
    const [first] = diagnostics;
    super(first?.text ?? "The cell could not be compiled.");
    this.name = first?.isSyntax ? "SyntaxError" : "TypeCheckError";
    this.diagnostics = diagnostics;
  }
}

/** An error found in a cell by the compiler, or by the check of a language inside a string. */
export interface CellDiagnostic {
  readonly text: string;
  readonly isSyntax: boolean;
  readonly start: Position;
  readonly end: Position;
  /** The file beside the notebook that has the error; absent = the cell itself. */
  readonly file?: string;
}

/** A cell that was interrupted. */
export class Interrupted extends Error {
  override readonly name = "Interrupted";

  constructor() {
    super(
      "The cell was interrupted. Variables of earlier cells keep the values assigned so far; names that this cell declares are not available.",
    );
  }
}
