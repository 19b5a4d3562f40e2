import { ruleError } from "../errors.js";
import type { Token } from "./token.js";
import type { TokenReader } from "./token-reader.js";

const form =
  "Write N or N[t] for the present value, N[t-1] or N[t-2] for a past one, and N[t+1] for the next.";

/** Reads what may follow a name in square brackets: [t], [t+1], [t-2]. Nothing means the present. */
export function parseOffset(reader: TokenReader, name: Token): { offset: number; end: number } {
  const open = reader.peek();
  if (!reader.accept("[")) return { offset: 0, end: name.end };
  const index = reader.take();
  if (index.kind !== "name" || index.text !== "t") {
    const wrong = `The index of "${name.text}" must be t, t+1, t-1 and so on.`;
    throw ruleError("unreadable-period", reader.text, { start: open.start, end: index.end }, wrong, form);
  }
  const offset = parseSteps(reader, name);
  const close = reader.expect("]", form);
  return { offset, end: close.end };
}

function parseSteps(reader: TokenReader, name: Token): number {
  const direction = reader.accept("+") ? 1 : reader.accept("-") ? -1 : 0;
  if (direction === 0) return 0;
  const steps = reader.take();
  if (steps.kind === "number" && /^\d{1,6}$/u.test(steps.text)) return direction * Number(steps.text) + 0;
  throw ruleError(
    "unreadable-period",
    reader.text,
    steps,
    `The offset in the index of "${name.text}" must be a whole number.`,
    form,
  );
}
