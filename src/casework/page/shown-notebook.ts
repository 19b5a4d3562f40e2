/** Text as the notebook format keeps it: whole, or in lines. */
export type Lines = string | readonly string[];

/** The parts of an executed notebook (nbformat 4.5) that a page is made from. */
export interface ShownNotebook {
  readonly cells: readonly ShownCell[];
  readonly metadata?: Readonly<Record<string, unknown>>;
}

/** A cell: markdown, code with its outputs, or raw text. */
export interface ShownCell {
  readonly cell_type: string;
  readonly source: Lines;
  readonly execution_count?: number | null;
  readonly outputs?: readonly ShownOutput[];
  readonly attachments?: Readonly<Record<string, Readonly<Record<string, unknown>>>>;
}

/** An output: a stream, an error, or data by MIME type. */
export interface ShownOutput {
  readonly output_type: string;
  readonly name?: string;
  readonly text?: Lines;
  readonly data?: Readonly<Record<string, unknown>>;
  readonly ename?: string;
  readonly evalue?: string;
  readonly traceback?: readonly string[];
}

/** One string of a text that may be kept in lines. */
export function joined(lines: unknown): string {
  if (Array.isArray(lines)) return lines.join("");
  return typeof lines === "string" ? lines : "";
}
