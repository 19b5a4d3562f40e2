import { cellName } from "../cells/cell-name.js";
import type { CellOutcome } from "../cells/cell-session.js";
import { errorReport } from "../cells/traceback.js";
import { stringErrors } from "../language/string-errors.js";
import { isDisplayHandle } from "../output/display.js";
import { outputQueue } from "../output/output-queue.js";
import { type Run, runAs } from "../output/run.js";
import { valueBundle } from "../output/value-bundle.js";
import type { Message } from "../protocol/message.js";
import type { HistoryEntry, KernelState } from "./kernel-state.js";
import { evaluateExpressions } from "./user-expressions.js";

/** One execution: the parsed request and its run. */
interface Execution {
  readonly code: string;
  readonly expressions: Readonly<Record<string, unknown>>;
  readonly run: Run;
  readonly count: number;
  readonly label: string;
  /** Its entry in the history, if it is stored. */
  readonly entry: HistoryEntry | undefined;
}

const hasString = /["'`]/;

/**
 * Runs one cell.
 * @returns the content of `execute_reply`, once every output of the cell has been published.
 * @see Jupyter messaging, "Execute".
 */
export async function execute(kernel: KernelState, request: Message): Promise<object> {
  const execution = startExecution(kernel, request);
  const { run, code, count } = execution;
  if (!run.silent) kernel.publish(request.header, "execute_input", { code, execution_count: count });
  const reply = await runAs(run, () => executeReply(kernel, execution));
  await run.output.drained();
  return { ...reply, execution_count: count };
}

function startExecution(kernel: KernelState, request: Message): Execution {
  const { content } = request;
  const silent = content["silent"] === true;
  const stored = !silent && content["store_history"] !== false;
  const code = String(content["code"] ?? "");
  const given = content["user_expressions"];
  kernel.serial += 1;
  if (stored) kernel.count += 1;
  const count = kernel.count;
  const entry = stored ? { count, text: code } : undefined;
  if (entry) kernel.history.push(entry);
  return {
    code,
    // An object of strings by the protocol; each is read as text later.
    expressions: typeof given === "object" && given !== null ? (given as Record<string, unknown>) : {},
    run: newRun(kernel, request, silent),
    count,
    label: stored ? `cell ${count}` : "this cell",
    entry,
  };
}

function newRun(kernel: KernelState, request: Message, silent: boolean): Run {
  const output = outputQueue(
    (type, content) => kernel.publish(request.header, type, content),
    (cause) => ({ name: "stderr", text: `An output could not be displayed: ${String(cause)}\n` }),
  );
  const allowsInput = request.content["allow_stdin"] === true;
  return { serial: kernel.serial, request, output, silent, allowsInput, stopped: false };
}

async function executeReply(kernel: KernelState, execution: Execution): Promise<object> {
  const { run, code, label, expressions } = execution;
  kernel.interrupts.begin(run, () => kernel.session().stop());
  try {
    const outcome = await runCell(kernel, execution);
    await run.output.drained();
    if (outcome.kind !== "failed") {
      return { status: "ok", payload: [], user_expressions: await evaluateExpressions(kernel, expressions) };
    }
    const report = errorReport(outcome.cause, code, label, kernel.sources);
    if (!run.silent) run.output.add("error", report);
    return { status: "error", ...report };
  } finally {
    kernel.questions.abandon();
    kernel.interrupts.end();
  }
}

/** Checks and runs the cell and shows its value. An error in any of these fails the cell. */
async function runCell(kernel: KernelState, execution: Execution): Promise<CellOutcome> {
  const { code, run, label } = execution;
  try {
    const session = kernel.session();
    const languages = hasString.test(code) ? await kernel.languages() : [];
    const languageErrors = stringErrors(session.compiler.library, languages, code);
    const outcome =
      languageErrors ?? (await session.run(code, cellName(run.serial), label, () => run.stopped));
    const isShown = outcome.kind === "value" && !run.silent && !isDisplayHandle(outcome.value);
    if (isShown) await show(outcome.value, execution);
    return outcome;
  } catch (cause) {
    return { kind: "failed", cause };
  }
}

async function show(value: unknown, { run, count, entry }: Execution): Promise<void> {
  const data = await valueBundle(value);
  if (entry) entry.result = String(data["text/plain"]);
  run.output.add("execute_result", { execution_count: count, data, metadata: {} });
}
