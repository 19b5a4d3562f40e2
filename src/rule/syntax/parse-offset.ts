import { ruleError } from "../errors.js";
import type { Token } from "./token.js";
import type { TokenReader } from "./token-reader.js";

const form = "Write the present value as N or N[t], a past one as N[t-1], N[t-2], the next as N[t+1].";

/** Reads what may follow a name in square brackets: [t], [t+1], [t-2]. Nothing means the present. */
export function parseOffset(reader: TokenReader, name: Token): { offset: number; end: number } {
  const open = reader.peek();
  if (!reader.accept("[")) return { offset: 0, end: name.end };
  const index = reader.take();
  if (index.kind !== "name" || index.text !== "t") {
    const wrong = `The period of "${name.text}" must be counted from t.`;
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
    `The number of periods after "${name.text}[t" must be a whole number.`,
    form,
  );
}
