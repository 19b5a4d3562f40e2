import { basename, dirname, join, resolve } from "node:path";
import { type Conversation, converse } from "./client/conversation.js";
import type { KernelCommand } from "./client/kernel-process.js";
import { answerOf } from "./notebook/answer-of.js";
import { type Cell, type Notebook, notebookText, readNotebook } from "./notebook/notebook.js";
import { type OutputRecord, outputRecord } from "./notebook/output-record.js";
import { writeWhole } from "./notebook/write-whole.js";
import { writePage } from "./page/write-page.js";
import { withSettings } from "./settings.js";

export interface RunOptions {
  readonly kernel: KernelCommand;
  /** Where the executed notebook and its page go; default: `out` beside the notebook. */
  readonly out?: string;
  /** Values for top-level constants of the notebook, by name, as they stand on a command line. */
  readonly set?: Readonly<Record<string, string>>;
  /** Told before each code cell: its number among the code cells, and how many there are. */
  readonly onCell?: (cell: number, of: number) => void;
}

/** The cell that ended a run. */
export interface CellFailure {
  readonly cell: number;
  readonly source: string;
  readonly ename: string;
  readonly evalue: string;
  readonly traceback: readonly string[];
}

/** What became of a notebook run without a front end. */
export type NotebookRun =
  | {
      readonly kind: "completed";
      readonly path: string;
      /** Paths of the executed notebook and of its page. */
      readonly executed: string;
      readonly page: string;
      readonly answer: string | undefined;
    }
  | { readonly kind: "failed"; readonly path: string; readonly failure: CellFailure };

/**
 * Runs every cell of a notebook in a kernel of its own and writes the executed notebook
 * and its page. The first cell with
 * an error ends the run, and then nothing is written: what an earlier run wrote stays.
 * @throws {KernelError} `unreadable-notebook` | `unknown-setting` | `kernel-ended` | `kernel-silent`.
 */
export async function runNotebook(path: string, options: RunOptions): Promise<NotebookRun> {
  const notebook = withSettings(readNotebook(path), options.set ?? {}, path);
  const conversation = await converse(options.kernel, dirname(resolve(path)));
  try {
    const executed = await executeCells(notebook, conversation, options.onCell);
    if (executed.kind === "failed") return { kind: "failed", path, failure: executed.failure };
    const place = join(options.out ?? join(dirname(path), "out"), basename(path));
    const page = place.replace(/(\.ipynb)?$/, ".html");
    writeWhole(place, notebookText(executed.notebook));
    writeWhole(
      page,
      writePage(executed.notebook, { title: basename(path, ".ipynb"), source: basename(path) }),
    );
    return { kind: "completed", path, executed: place, page, answer: answerOf(executed.notebook) };
  } finally {
    await conversation.end();
  }
}

type Executed =
  | { readonly kind: "completed"; readonly notebook: Notebook }
  | { readonly kind: "failed"; readonly failure: CellFailure };

async function executeCells(
  notebook: Notebook,
  conversation: Conversation,
  onCell: RunOptions["onCell"] = () => undefined,
): Promise<Executed> {
  const record = outputRecord();
  const code = notebook.cells.filter((cell) => cell.cell_type === "code" && cell.source.trim() !== "");
  const counts = new Map<string, number>();
  for (const [index, cell] of code.entries()) {
    onCell(index + 1, code.length);
    const content = await execute(conversation, cell, record);
    if (content["status"] !== "ok") return { kind: "failed", failure: failureOf(cell, index + 1, content) };
    counts.set(cell.id, Number(content["execution_count"]));
  }
  const cells = notebook.cells.map((cell) =>
    cell.cell_type === "code"
      ? { ...cell, outputs: record.outputsOf(cell.id), execution_count: counts.get(cell.id) ?? null }
      : cell,
  );
  return { kind: "completed", notebook: { ...notebook, cells } };
}

async function execute(conversation: Conversation, cell: Cell, record: OutputRecord): Promise<Content> {
  const content = {
    code: cell.source,
    silent: false,
    store_history: true,
    allow_stdin: false,
    stop_on_error: true,
  };
  const reply = await conversation.request("execute_request", content, (message) => {
    // The first message of a cell names its request.
    if (message.header.msg_type === "execute_input") record.belongs(message.parent.msg_id ?? "", cell.id);
    record.take(message);
  });
  return reply.content;
}

type Content = Readonly<Record<string, unknown>>;

function failureOf(cell: Cell, number: number, content: Content): CellFailure {
  return {
    cell: number,
    source: cell.source,
    ename: String(content["ename"] ?? content["status"]),
    evalue: String(content["evalue"] ?? ""),
    traceback: Array.isArray(content["traceback"]) ? content["traceback"].map(String) : [],
  };
}
