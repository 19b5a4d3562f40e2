import { cellName } from "../cells/cell-name.js";
import type { CellOutcome } from "../cells/cell-session.js";
import { errorReport } from "../cells/traceback.js";
import { stringErrors } from "../language/string-errors.js";
import { outputQueue } from "../output/output-queue.js";
import { type Run, runAs } from "../output/run.js";
import { valueBundle } from "../output/value-bundle.js";
import type { Message } from "../protocol/message.js";
import type { KernelState } from "./kernel-state.js";
import { evaluateExpressions } from "./user-expressions.js";

interface ExecuteRequest {
  readonly code: string;
  readonly silent: boolean;
  readonly storesHistory: boolean;
  readonly expressions: Readonly<Record<string, unknown>>;
}

function read({ content }: Message): ExecuteRequest {
  const silent = content["silent"] === true;
  const expressions = content["user_expressions"];
  return {
    code: String(content["code"] ?? ""),
    silent,
    storesHistory: !silent && content["store_history"] !== false,
    // An object of strings by the protocol; each is read as text below.
    expressions:
      typeof expressions === "object" && expressions !== null ? (expressions as Record<string, unknown>) : {},
  };
}

/**
 * Runs one cell.
 * @returns the content of `execute_reply`, once every output of the cell has been published.
 * @see Jupyter messaging, "Execute".
 */
export async function execute(kernel: KernelState, request: Message): Promise<object> {
  const asked = read(request);
  if (asked.storesHistory) {
    kernel.count += 1;
    kernel.history.push({ count: kernel.count, text: asked.code });
  }
  kernel.serial += 1;
  const execution_count = kernel.count;
  const publish = (type: string, content: object): void => kernel.publish(request.header, type, content);
  if (!asked.silent) publish("execute_input", { code: asked.code, execution_count });
  const run = newRun(kernel, request, asked.silent);
  const reply = await runAs(run, () => answered(kernel, run, asked, execution_count));
  await run.output.drained();
  return { ...reply, execution_count };
}

function newRun(kernel: KernelState, request: Message, silent: boolean): Run {
  const output = outputQueue(
    (type, content) => kernel.publish(request.header, type, content),
    (cause) => ({ name: "stderr", text: `An output could not be shown: ${String(cause)}\n` }),
  );
  const allowsInput = request.content["allow_stdin"] === true;
  return { serial: kernel.serial, request, output, silent, allowsInput, stopped: false };
}

async function answered(
  kernel: KernelState,
  run: Run,
  asked: ExecuteRequest,
  count: number,
): Promise<object> {
  const { output, silent, serial } = run;
  const label = asked.storesHistory ? `cell ${count}` : "this cell";
  const session = kernel.session();
  kernel.interrupts.begin(run, session.stop);
  try {
    const refused = stringErrors(session.compiler.library, kernel.languages, asked.code);
    const done = refused ?? (await session.run(asked.code, cellName(serial), label));
    const outcome = await shown(kernel, done, run, count);
    await output.drained();
    if (outcome.kind !== "failed") {
      const user_expressions = await evaluateExpressions(kernel, asked.expressions);
      return { status: "ok", payload: [], user_expressions };
    }
    const report = errorReport(outcome.cause, asked.code, label, kernel.sources);
    if (!silent) output.add("error", report);
    return { status: "error", ...report };
  } finally {
    kernel.interrupts.end();
  }
}

/** Publishes the value of a cell. One that fails while it shows itself fails the cell. */
async function shown(
  kernel: KernelState,
  outcome: CellOutcome,
  run: Run,
  execution_count: number,
): Promise<CellOutcome> {
  if (outcome.kind !== "value" || run.silent) return outcome;
  try {
    const data = await valueBundle(outcome.value);
    const entry = kernel.history.at(-1);
    if (entry?.count === execution_count) entry.result = String(data["text/plain"]);
    run.output.add("execute_result", { execution_count, data, metadata: {} });
    return outcome;
  } catch (cause) {
    return { kind: "failed", cause };
  }
}
