import type { PlaceFinder } from "./source-places.js";

/** A text that code was compiled from: a cell, or a file beside the notebook. */
export interface Source {
  /** The name that stack traces carry. */
  readonly name: string;
  /** What a person calls it: "cell 3", "rates.ts". */
  readonly label: string;
  /** Known for a cell; that of a file is read when it is needed. */
  readonly text?: string;
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
