import { randomBytes } from "node:crypto";
import { readFileSync } from "node:fs";
import { unreadableNotebookError } from "../errors.js";

/** An output of a code cell, as nbformat 4.5 stores it. */
export type Output = Readonly<Record<string, unknown>> & { readonly output_type: string };

/** A cell with its source as one string. @see nbformat 4.5, "Cell types". */
export interface Cell {
  readonly id: string;
  readonly cell_type: "code" | "markdown" | "raw";
  readonly source: string;
  readonly metadata: Readonly<Record<string, unknown>>;
  readonly outputs?: readonly Output[];
  readonly execution_count?: number | null;
}

export interface Notebook {
  readonly nbformat: 4;
  readonly nbformat_minor: number;
  readonly metadata: Readonly<Record<string, unknown>>;
  readonly cells: readonly Cell[];
}

/** Reads a notebook of format 4 and converts it to 4.5: every cell has an id, and its source is one string. */
export function readNotebook(path: string): Notebook {
  try {
    const given = JSON.parse(readFileSync(path, "utf8")) as Record<string, unknown>;
    if (given["nbformat"] !== 4 || !Array.isArray(given["cells"])) throw new Error("not notebook format 4");
    const metadata = (given["metadata"] ?? {}) as Notebook["metadata"];
    return { nbformat: 4, nbformat_minor: 5, metadata, cells: given["cells"].map(readCell) };
  } catch (cause) {
    throw unreadableNotebookError(path, cause);
  }
}

function readCell(given: Readonly<Record<string, unknown>>): Cell {
  const source = joined(given["source"]);
  const id = typeof given["id"] === "string" ? given["id"] : randomBytes(4).toString("hex");
  const metadata = (given["metadata"] ?? {}) as Cell["metadata"];
  if (given["cell_type"] !== "code") {
    const cell_type = given["cell_type"] === "raw" ? "raw" : "markdown";
    const attachments = given["attachments"] === undefined ? {} : { attachments: given["attachments"] };
    return { id, cell_type, source, metadata, ...attachments };
  }
  const outputs = (given["outputs"] ?? []) as readonly Output[];
  return { id, cell_type: "code", source, metadata, outputs, execution_count: null };
}

function joined(text: unknown): string {
  return Array.isArray(text) ? text.join("") : String(text ?? "");
}

/** A notebook as file contents, with sources split into lines as notebook programs write them. */
export function notebookText(notebook: Notebook): string {
  const cells = notebook.cells.map((cell) => ({ ...cell, source: lines(cell.source) }));
  return `${JSON.stringify({ cells, metadata: notebook.metadata, nbformat: 4, nbformat_minor: 5 }, undefined, 1)}\n`;
}

function lines(text: string): readonly string[] {
  return text.match(/[^\n]*\n|[^\n]+$/g) ?? [];
}
