import { SourceMap } from "node:module";

/** A position in a text; line and column count from 1. */
export interface Position {
  readonly line: number;
  readonly column: number;
}

/** Maps a position in generated code back to its source. */
export type PositionMapper = (generated: Position) => Position | undefined;

const comment = /\n?\/\/# sourceMappingURL=data:application\/json;base64,([A-Za-z0-9+/=]+)\s*$/;

/** Separates code from the source map at its end. */
export function splitInlineMap(code: string): { readonly code: string; readonly map: string | undefined } {
  const found = comment.exec(code);
  if (found?.[1] === undefined) return { code, map: undefined };
  return { code: code.slice(0, found.index), map: Buffer.from(found[1], "base64").toString("utf8") };
}

/**
 * Follows a chain of maps, the last stage of compilation first. The maps are read on first use: most cells
 * never fail.
 */
export function positionMapper(maps: readonly string[]): PositionMapper {
  let read: SourceMap[] | undefined;
  return (generated) => {
    read ??= maps.map((map) => new SourceMap(JSON.parse(map)));
    let position: Position | undefined = generated;
    for (const map of read) position = position && step(map, position);
    return position;
  };
}

function step(map: SourceMap, { line, column }: Position): Position | undefined {
  const entry = map.findEntry(line - 1, column - 1);
  return "originalLine" in entry
    ? { line: entry.originalLine + 1, column: entry.originalColumn + 1 }
    : undefined;
}
