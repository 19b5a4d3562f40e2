import type ts from "typescript-cell";
import { stringAt } from "../language/string-at.js";
import type { Message } from "../protocol/message.js";
import { type Cursor, cursorOf } from "./cursor.js";
import { enclosingCallee } from "./enclosing-callee.js";
import type { KernelState } from "./kernel-state.js";

/** @see Jupyter messaging, "Introspection". */
export async function inspect(kernel: KernelState, request: Message): Promise<object> {
  const cursor = cursorOf(request);
  const deep = request.content["detail_level"] === 1;
  const markdown = (await aboutString(kernel, cursor)) ?? (await aboutCode(kernel, cursor, deep));
  if (markdown === undefined) return { status: "ok", found: false, data: {}, metadata: {} };
  const data = { "text/markdown": markdown, "text/plain": markdown.replace(/^```.*\n/gm, "") };
  return { status: "ok", found: true, data, metadata: {} };
}

async function aboutString(kernel: KernelState, { text, position }: Cursor): Promise<string | undefined> {
  const found = stringAt(kernel.session().compiler.library, await kernel.languages(), text, position);
  return found?.language.inspect(found.text, position - found.start);
}

async function aboutCode(
  kernel: KernelState,
  { text, position }: Cursor,
  deep: boolean,
): Promise<string | undefined> {
  const { compiler, declarations } = kernel.session();
  const places = [position, position - 1, enclosingCallee(compiler.library, text, position)];
  for (const place of places) {
    if (place === undefined || place < 0) continue;
    const info = compiler.inspect(declarations(), text, place);
    if (info?.displayParts?.length) return withHelp(kernel, info as ts.QuickInfo, deep);
  }
  return undefined;
}

/** What the compiler tells, and what is known of an imported function besides. */
async function withHelp(kernel: KernelState, info: ts.QuickInfo, deep: boolean): Promise<string> {
  const imported = info.displayParts?.find(({ kind }) => kind === "aliasName")?.text;
  const help = imported === undefined ? undefined : await kernel.functionHelp(imported);
  return [markdownOf(info, deep), ...(help === undefined ? [] : [help])].join("\n\n");
}

const plainTags = ["param", "returns"];

/** Type, docstring and tags; errors, sources and examples only at detail level 1. */
function markdownOf({ displayParts, documentation, tags }: ts.QuickInfo, deep: boolean): string {
  const shown = (tags ?? []).filter(({ name }) => deep || plainTags.includes(name));
  const parts = [
    `\`\`\`typescript\n${joined(displayParts)}\n\`\`\``,
    joined(documentation),
    ...shown.map(tagMarkdown),
  ];
  return parts.filter((part) => part !== "").join("\n\n");
}

function tagMarkdown({ name, text }: ts.JSDocTagInfo): string {
  const shown = joined(text);
  if (name === "example") return `*example*\n\`\`\`typescript\n${shown}\n\`\`\``;
  return `*${name}* ${shown}`;
}

function joined(parts: readonly ts.SymbolDisplayPart[] | undefined): string {
  return (parts ?? []).map(({ text }) => text).join("");
}
