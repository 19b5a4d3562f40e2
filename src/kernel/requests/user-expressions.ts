import { cellName } from "../cells/cell-name.js";
import { errorReport } from "../cells/traceback.js";
import { valueBundle } from "../output/value-bundle.js";
import type { KernelState } from "./kernel-state.js";

/** Evaluates the expressions that came with a cell, after it. @see Jupyter messaging, "user_expressions". */
export async function evaluateExpressions(
  kernel: KernelState,
  expressions: Readonly<Record<string, unknown>>,
): Promise<Record<string, object>> {
  const results: Record<string, object> = {};
  for (const [name, expression] of Object.entries(expressions)) {
    results[name] = await evaluate(kernel, String(expression));
  }
  return results;
}

async function evaluate(kernel: KernelState, expression: string): Promise<object> {
  kernel.serial += 1;
  const label = "a user expression";
  const outcome = await kernel.session().run(expression, cellName(kernel.serial), label);
  if (outcome.kind === "failed") {
    return { status: "error", ...errorReport(outcome.cause, expression, label, kernel.sources) };
  }
  const value = outcome.kind === "value" ? outcome.value : undefined;
  return { status: "ok", data: await valueBundle(value), metadata: {} };
}
