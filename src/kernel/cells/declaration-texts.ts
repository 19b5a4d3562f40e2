import { readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { cellGlobals, smallNodeGlobals } from "./cell-globals.js";
import { compilerPath } from "./compiler-library.js";
import { installationFolder } from "./installation.js";
import { isInLanguageLibrary, languageLibrary, languageLibraryName } from "./language-library.js";

/**
 * The declarations that come with the kernel, as the compiler reads them. Reading is most of the cost of a first
 * import, so docstrings are omitted until one is requested, and Node's declarations until a cell uses one of them,
 * even where a package refers to them.
 */
export interface DeclarationTexts {
  /** A virtual file: what cells can use without an import. */
  readonly globalsFile: string;
  readonly isVirtual: (path: string) => boolean;
  /** The text of a file where it differs from the one on disk. */
  readonly read: (path: string) => string | undefined;
  /** Returns the files to be read again. */
  readonly addNodeTypes: () => readonly string[];
  readonly addDocs: () => readonly string[];
}

const docstring = /^[ \t]*\/\*\*.*?\*\/[ \t]*$/gms;
const nodeReference = /^\/\/\/ <reference types="node" *\/>/gm;

export function declarationTexts(folder: string): DeclarationTexts {
  const globalsFile = inFolder(folder, "__globals__.d.ts");
  const libraryFile = inFolder(dirname(compilerPath), languageLibraryName);
  const installation = inFolder(installationFolder(), "");
  const built = inFolder(installationFolder(), "dist/");
  const withoutDocs = new Set<string>();
  let nodeTypes = false;
  let docs = false;

  const globals = (): string =>
    // A reference counts only before everything else.
    nodeTypes ? `/// <reference types="node" />\n${cellGlobals}` : cellGlobals + smallNodeGlobals;
  const declarations = (path: string): string => {
    const text = readFileSync(path, "utf8").replace(nodeReference, "");
    const isOwn = path.startsWith(built);
    if (docs && isOwn) return text;
    if (isOwn) withoutDocs.add(path);
    return text.replace(docstring, "");
  };
  const addOnce = (wasThere: boolean, changed: readonly string[]): readonly string[] =>
    wasThere ? [] : changed;

  return {
    globalsFile,
    isVirtual: (path) => path === globalsFile || path === libraryFile,
    read: (path) => {
      if (path === globalsFile) return globals();
      if (path === libraryFile) return languageLibrary(compilerPath, docs);
      if (isInLanguageLibrary(compilerPath, path)) return "";
      return path.startsWith(installation) && path.endsWith(".d.ts") ? declarations(path) : undefined;
    },
    addNodeTypes: () => {
      const changed = addOnce(nodeTypes, [globalsFile]);
      nodeTypes = true;
      return changed;
    },
    addDocs: () => {
      const changed = addOnce(docs, [libraryFile, ...withoutDocs]);
      docs = true;
      return changed;
    },
  };
}

function inFolder(folder: string, name: string): string {
  return join(folder, name).replaceAll("\\", "/");
}
