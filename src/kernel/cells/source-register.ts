import type { PlaceFinder } from "./source-places.js";

/** A text that code was compiled from: a cell, or a file beside the notebook. */
export interface Source {
  /** The name that stack traces carry. */
  readonly name: string;
  /** What a person calls it: "cell 3", "rates.ts". */
  readonly label: string;
  /** The text of a cell. */
  readonly text?: string;
  /** The path of a file, whose text is read when it is needed. */
  readonly file?: string;
  readonly findPlace: PlaceFinder | undefined;
}

/** Every text compiled so far, by the name in stack traces: functions outlive the cell that made them. */
export interface SourceRegister {
  readonly add: (source: Source) => void;
  readonly find: (name: string) => Source | undefined;
}

export function sourceRegister(): SourceRegister {
  const sources = new Map<string, Source>();
  return {
    add: (source) => void sources.set(source.name, source),
    find: (name) => sources.get(name),
  };
}
