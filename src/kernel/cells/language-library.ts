import { readFileSync } from "node:fs";
import { basename, dirname, join } from "node:path";

/** Virtual file with the declarations of the language itself. */
export const languageLibraryName = "lib.cell.d.ts";

const reference = /^\/\/\/ <reference lib="([^"]+)" *\/>\r?\n?/gm;

/**
 * The declarations of the language (ES2022), merged from many files of the compiler into one. A type that is spread over
 * many files is merged again for every cell; within one file that is done once. Docstrings are omitted until one is
 * requested, because reading them takes as long as reading the rest.
 */
export function languageLibrary(compilerPath: string, withDocs: boolean): string {
  const folder = dirname(compilerPath);
  const seen = new Set<string>();
  const collect = (name: string): string => {
    if (seen.has(name)) return "";
    seen.add(name);
    const text = readFileSync(join(folder, `lib.${name}.d.ts`), "utf8");
    const before = [...text.matchAll(reference)].map(([, inner = ""]) => collect(inner));
    return [...before, text.replace(reference, "")].join("\n");
  };
  const text = collect("es2022").replace(/^\/\/\/ <reference no-default-lib="true"\/>/gm, "");
  return withDocs ? text : text.replace(/\/\*.*?\*\//gs, "");
}

/** Whether a file is one of the merged files; packages refer to them by name. */
export function isInLanguageLibrary(compilerPath: string, path: string): boolean {
  const isLibrary = dirname(path) === dirname(compilerPath).replaceAll("\\", "/");
  return isLibrary && /^lib\.es(5|6|20\d\d)[\w.]*\.d\.ts$/.test(basename(path));
}
