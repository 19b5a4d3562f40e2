import type { PositionMapper } from "./source-positions.js";

/** A text that code was compiled from: a cell, or a file beside the notebook. */
export interface Source {
  /** The name that stack traces carry. */
  readonly name: string;
  /** Name for the reader: "cell 3", "rates.ts". */
  readonly label: string;
  /** The text of a cell. */
  readonly text?: string;
  /** The path of a file; its text is read when needed. */
  readonly file?: string;
  readonly mapPosition: PositionMapper | undefined;
}

/** Every text compiled so far, by its name in stack traces: functions outlive the cell that defined them. */
export interface SourceRegistry {
  readonly add: (source: Source) => void;
  readonly find: (name: string) => Source | undefined;
}

export function sourceRegistry(): SourceRegistry {
  const sources = new Map<string, Source>();
  return {
    add: (source) => void sources.set(source.name, source),
    find: (name) => sources.get(name),
  };
}
