/** Text in the notebook format: one string, or an array of lines. */
export type Lines = string | readonly string[];

/** The parts of an executed notebook (nbformat 4.5) that a page shows. */
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

/** The text as one string. */
export function joined(lines: unknown): string {
  if (Array.isArray(lines)) return lines.join("");
  return typeof lines === "string" ? lines : "";
}
