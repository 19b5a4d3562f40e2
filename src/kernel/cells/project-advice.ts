import type ts from "typescript-cell";

/** Names of other languages, and how to write them in a cell. */
const otherLanguages: ReadonlyMap<string, string> = new Map([
  ["print", "To print, write console.log(...)."],
  ["println", "To print, write console.log(...)."],
  ["len", "For a length, write values.length."],
  ["None", "For no value, write undefined or null."],
  ["NULL", "For no value, write undefined or null."],
  ["NA", "For a missing number, write NaN."],
  ["True", "Write true."],
  ["False", "Write false."],
  ["TRUE", "Write true."],
  ["FALSE", "Write false."],
]);

const moduleNotFound = 2307;
const declarationsNotFound = 7016;
const nameNotFound = [2304, 2552];
const extensionInImport = 5097;

const projectSettings =
  / (Do you need to change your target library\? )?Try changing the 'lib' compiler option[^.]*\.| Do you need to install type definitions[^.]*\./g;

/** Compiler messages also advise on project settings, which a notebook does not have. */
export function withoutProjectSettings(
  message: string | ts.DiagnosticMessageChain,
): string | ts.DiagnosticMessageChain {
  if (typeof message !== "string")
    return { ...message, messageText: message.messageText.replace(projectSettings, "") };
  return message.replace(projectSettings, "");
}

/** What to do about an error whose message does not say it; undefined for all others. */
export function adviceFor({ code, messageText, file, start = 0 }: ts.Diagnostic): string | undefined {
  const text = typeof messageText === "string" ? messageText : messageText.messageText;
  const name = /'([^']+)'/.exec(text)?.[1] ?? "";
  if (code === moduleNotFound || code === declarationsNotFound) return moduleAdvice(name);
  if (nameNotFound.includes(code)) return otherLanguages.get(name);
  if (code === extensionInImport) return 'Leave out the extension, as in: import { rate } from "./rates".';
  return file === undefined ? undefined : thousandsAdvice(file.text, start);
}

function moduleAdvice(name: string): string {
  if (name.startsWith(".")) return `There is no file "${name}" beside the notebook.`;
  const [scope = "", inner = ""] = name.split("/");
  const packageName = scope.startsWith("@") ? `${scope}/${inner}` : scope;
  return `Install the package in the folder of the notebook: npm install ${packageName}`;
}

/** "2,000" is read as two numbers. */
function thousandsAdvice(text: string, start: number): string | undefined {
  const number = /\d{1,3}(?:,\d{3})+(?!\d)/g;
  for (const found of text.slice(Math.max(0, start - 12), start + 12).matchAll(number)) {
    const from = Math.max(0, start - 12) + found.index;
    if (from <= start && start <= from + found[0].length)
      return `Write numbers without thousands separators: ${found[0].replaceAll(",", "")}.`;
  }
  return undefined;
}
