import { stringAt } from "../language/string-at.js";
import type { Message } from "../protocol/message.js";
import { toCodePoints } from "./code-points.js";
import { type Cursor, cursorOf } from "./cursor.js";
import type { KernelState } from "./kernel-state.js";

/** Completions for the text between `start` and `end` (UTF-16 units), each with its kind. */
interface Offers {
  readonly start: number;
  readonly end: number;
  readonly items: readonly { readonly text: string; readonly kind: string }[];
}

/** @see Jupyter messaging, "Completion"; the kinds are in the metadata field where front ends read them. */
export async function complete(kernel: KernelState, request: Message): Promise<object> {
  const cursor = cursorOf(request);
  const { start, end, items } = (await offersInString(kernel, cursor)) ?? offersInCode(kernel, cursor);
  const cursor_start = toCodePoints(cursor.text, start);
  const cursor_end = toCodePoints(cursor.text, end);
  const kinds = items.map(({ text, kind }) => ({ text, type: kind, start: cursor_start, end: cursor_end }));
  return {
    status: "ok",
    matches: items.map(({ text }) => text),
    cursor_start,
    cursor_end,
    metadata: { _jupyter_types_experimental: kinds },
  };
}

async function offersInString(kernel: KernelState, { text, position }: Cursor): Promise<Offers | undefined> {
  const languages = await kernel.languages();
  const found = stringAt(kernel.session().compiler.library, languages, text, position);
  if (found === undefined) return undefined;
  const offers = found.language.complete(found.text, position - found.start);
  return { start: offers.start + found.start, end: offers.end + found.start, items: offers.items };
}

function offersInCode(kernel: KernelState, { text, position }: Cursor): Offers {
  const session = kernel.session();
  const { start, end, candidates, original } = session.compiler.complete(
    session.declarations(),
    text,
    position,
  );
  const kinds = new Map((original?.entries ?? []).map((entry) => [entry.name, entry.kind as string]));
  return { start, end, items: candidates.map((name) => ({ text: name, kind: kinds.get(name) ?? "name" })) };
}
