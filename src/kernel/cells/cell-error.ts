import type { Place } from "./source-places.js";

/** A cell that the compiler refused: nothing of it ran. */
export class CellError extends Error {
  override readonly name: "SyntaxError" | "TypeCheckError";
  readonly complaints: readonly Complaint[];

  constructor(complaints: readonly Complaint[]) {
    const [first] = complaints;
    super(first?.text ?? "The cell could not be read.");
    this.name = first?.isSyntax ? "SyntaxError" : "TypeCheckError";
    this.complaints = complaints;
  }
}

/** What the compiler, or a check of a language inside a string, has against a cell. */
export interface Complaint {
  readonly text: string;
  readonly isSyntax: boolean;
  readonly start: Place;
  readonly end: Place;
  /** The file beside the notebook it is in; absent = the cell itself. */
  readonly file?: string;
}

/** A cell that the user stopped. */
export class Interrupted extends Error {
  override readonly name = "Interrupted";

  constructor() {
    super("The cell was stopped before it had finished. What it had set so far is kept.");
  }
}
