import { escapeHtml } from "../../../kernel-helpers/wording/index.js";

// Colours and cursor moves that programs send to a terminal, and other control characters.
// biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is looked for.
const terminal = /\u001b\[[0-9;?]*[A-Za-z]|\u001b\][^\u0007]*\u0007|[\u0000-\u0008\u000b-\u001f\u007f]/g;

/** Terminal output as HTML, without its colours and cursor moves. */
export function escapeTerminal(text: string): string {
  return escapeHtml(text.replace(/\r\n/g, "\n").replace(terminal, ""));
}
