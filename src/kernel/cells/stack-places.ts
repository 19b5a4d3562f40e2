import type { Place } from "./source-places.js";
import type { Source, SourceRegister } from "./source-register.js";

/** A step of a stack that lies in a cell or in a file beside the notebook. */
export interface StackPlace {
  readonly source: Source;
  readonly place: Place;
}

const frame = /(?:\(|at (?:async )?)([^()\s][^()]*?):(\d+):(\d+)\)?$/;
/** The code of a cell begins on the second line of what runs, after the wrapper's own. */
const wrapperLines = 1;

/** The steps of an error's stack that a reader of the notebook can look at, the innermost first. */
export function stackPlaces(cause: unknown, sources: SourceRegister): readonly StackPlace[] {
  const stack: unknown = typeof cause === "object" && cause !== null ? Reflect.get(cause, "stack") : "";
  return String(stack ?? "")
    .split("\n")
    .flatMap((line) => {
      const [, name = "", row = "0", column = "0"] = frame.exec(line) ?? [];
      const source = sources.find(name);
      if (source === undefined) return [];
      const lead = source.text === undefined ? 0 : wrapperLines;
      const place = source.findPlace?.({ line: Number(row) - lead, column: Number(column) });
      return place === undefined ? [] : [{ source, place }];
    });
}
