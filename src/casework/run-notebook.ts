import { basename, dirname, join, resolve } from "node:path";
import type { KernelCommand } from "./client/kernel-process.js";
import { type KernelSession, startKernelSession } from "./client/kernel-session.js";
import { answerOf } from "./notebook/answer-of.js";
import { type Cell, type Notebook, notebookText, readNotebook } from "./notebook/notebook.js";
import { type OutputCollector, outputCollector } from "./notebook/output-collector.js";
import { writeFileAtomic } from "./notebook/write-file-atomic.js";
import { writePage } from "./page/write-page.js";
import { withSettings } from "./settings.js";

export interface RunOptions {
  readonly kernel: KernelCommand;
  /** Folder for the executed notebook and its page. Default: `out` beside the notebook. */
  readonly out?: string;
  /** Values of top-level constants of the notebook by name, as written on the command line. */
  readonly set?: Readonly<Record<string, string>>;
  /** Called before each code cell with its number among the code cells and their count. */
  readonly onCell?: (cell: number, of: number) => void;
}

/** The cell that failed. */
export interface CellFailure {
  readonly cell: number;
  readonly source: string;
  readonly ename: string;
  readonly evalue: string;
  readonly traceback: readonly string[];
}

/** The outcome of a notebook run without a front end. */
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
 * Runs every cell of a notebook in a kernel of its own and writes the executed notebook and its page. The first cell
 * with an error ends the run; then nothing is written, and the files of an earlier run are kept.
 * @throws {KernelError} `unreadable-notebook` | `unknown-setting` | `kernel-ended` | `kernel-silent`.
 */
export async function runNotebook(path: string, options: RunOptions): Promise<NotebookRun> {
  const notebook = withSettings(readNotebook(path), options.set ?? {}, path);
  const session = await startKernelSession(options.kernel, dirname(resolve(path)));
  try {
    const executed = await executeCells(notebook, session, options.onCell);
    if (executed.kind === "failed") return { kind: "failed", path, failure: executed.failure };
    const executedPath = join(options.out ?? join(dirname(path), "out"), basename(path));
    const page = executedPath.replace(/(\.ipynb)?$/, ".html");
    writeFileAtomic(executedPath, notebookText(executed.notebook));
    writeFileAtomic(
      page,
      writePage(executed.notebook, { title: basename(path, ".ipynb"), source: basename(path) }),
    );
    return { kind: "completed", path, executed: executedPath, page, answer: answerOf(executed.notebook) };
  } finally {
    await session.end();
  }
}

type Executed =
  | { readonly kind: "completed"; readonly notebook: Notebook }
  | { readonly kind: "failed"; readonly failure: CellFailure };

async function executeCells(
  notebook: Notebook,
  session: KernelSession,
  onCell: RunOptions["onCell"] = () => undefined,
): Promise<Executed> {
  const record = outputCollector();
  const code = notebook.cells.filter((cell) => cell.cell_type === "code" && cell.source.trim() !== "");
  const counts = new Map<string, number>();
  for (const [index, cell] of code.entries()) {
    onCell(index + 1, code.length);
    const content = await execute(session, cell, record);
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

async function execute(session: KernelSession, cell: Cell, record: OutputCollector): Promise<Content> {
  const content = {
    code: cell.source,
    silent: false,
    store_history: true,
    allow_stdin: false,
    stop_on_error: true,
  };
  const reply = await session.request("execute_request", content, (message) => {
    // The first message of a cell has the id of its request.
    if (message.header.msg_type === "execute_input") record.assign(message.parent.msg_id ?? "", cell.id);
    record.add(message);
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
