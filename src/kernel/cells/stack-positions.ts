import type { Position } from "./source-positions.js";
import type { Source, SourceRegistry } from "./source-registry.js";

/** A stack frame in a cell or in a file beside the notebook. */
export interface StackPosition {
  readonly source: Source;
  readonly position: Position;
}

const frame = /(?:\(|at (?:async )?)([^()\s][^()]*?):(\d+):(\d+)\)?$/;
/** The code of a cell starts on the second line, after that of its wrapper. */
const wrapperLines = 1;

/** The stack frames of an error that are in the notebook or beside it, innermost first. */
export function stackPositions(cause: unknown, sources: SourceRegistry): readonly StackPosition[] {
  const stack: unknown = typeof cause === "object" && cause !== null ? Reflect.get(cause, "stack") : "";
  return String(stack ?? "")
    .split("\n")
    .flatMap((line) => {
      const [, name = "", row = "0", column = "0"] = frame.exec(line) ?? [];
      const source = sources.find(name);
      if (source === undefined) return [];
      const lead = source.text === undefined ? 0 : wrapperLines;
      const position = source.mapPosition?.({ line: Number(row) - lead, column: Number(column) });
      return position === undefined ? [] : [{ source, position }];
    });
}
