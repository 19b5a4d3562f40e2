const entities: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

// Colours and cursor moves that programs send to a terminal, and whatever else would act instead of being read.
// biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is looked for.
const terminal = /\u001b\[[0-9;?]*[A-Za-z]|\u001b\][^\u0007]*\u0007|[\u0000-\u0008\u000b-\u001f\u007f]/g;

/** Text as HTML that shows exactly that text. */
export function escapeText(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => entities[sign] ?? sign);
}

/** A terminal's text as HTML: its colours and cursor moves left out. */
export function escapeTerminal(text: string): string {
  return escapeText(text.replace(/\r\n/g, "\n").replace(terminal, ""));
}
