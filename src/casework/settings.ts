import { type Initialiser, initialisers } from "../kernel/index.js";
import { unknownSettingError } from "./errors.js";
import type { Cell, Notebook } from "./notebook/notebook.js";

interface Settable extends Initialiser {
  readonly cell: Cell;
}

/**
 * The notebook with other values for some of its top-level constants, so that a case can be run under another
 * assumption without editing it. The executed notebook shows the changed source.
 * @throws {KernelError} `unknown-setting` when no cell has such a name at its top level.
 */
export function withSettings(
  notebook: Notebook,
  set: Readonly<Record<string, string>>,
  path: string,
): Notebook {
  return Object.entries(set).reduce(
    (changed, [name, value]) => withSetting(changed, name, value, path),
    notebook,
  );
}

function withSetting(notebook: Notebook, name: string, value: string, path: string): Notebook {
  const code = notebook.cells.filter((cell) => cell.cell_type === "code");
  const settable: Settable[] = code.flatMap((cell) =>
    initialisers(cell.source).map((one) => ({ ...one, cell })),
  );
  const target = settable.find((one) => one.name === name);
  if (target === undefined) {
    throw unknownSettingError(
      name,
      path,
      settable.map((one) => one.name),
    );
  }
  const { cell, start, end } = target;
  const source = cell.source.slice(0, start) + asExpression(value) + cell.source.slice(end);
  return { ...notebook, cells: notebook.cells.map((one) => (one === cell ? { ...cell, source } : one)) };
}

/** A number, true, false, null or other JSON is inserted as it is; anything else as a string. */
function asExpression(value: string): string {
  try {
    JSON.parse(value);
    return value;
  } catch {
    return JSON.stringify(value);
  }
}
