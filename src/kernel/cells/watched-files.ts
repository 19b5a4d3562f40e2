import { statSync } from "node:fs";
import type ts from "typescript-cell";

/**
 * Stands in for the compiler's file watching. Nothing is watched in the background: before a cell is compiled
 * `refresh` looks at the files beside the notebook and reports those that changed, so that a cell always sees
 * what is on disk when it runs.
 */
export interface WatchedFiles {
  readonly watchFile: NonNullable<ts.System["watchFile"]>;
  readonly watchDirectory: NonNullable<ts.System["watchDirectory"]>;
  /** Reports the changed files; `changed` is what to tell the compiler about a file that changed elsewhere. */
  readonly refresh: () => readonly string[];
  readonly report: (path: string) => void;
}

interface Watched<Callback> {
  readonly callback: Callback;
  stamp: number;
}

export function watchedFiles(library: typeof ts, folder: string): WatchedFiles {
  const files = new Map<string, Watched<ts.FileWatcherCallback>>();
  const folders = new Map<string, Watched<ts.DirectoryWatcherCallback>>();
  const isOurs = (path: string): boolean => path.startsWith(folder);
  const report = (path: string): void =>
    files.get(path)?.callback(path, library.FileWatcherEventKind.Changed);
  return {
    watchFile: (path, callback) => keep(files, path, callback, isOurs(path)),
    watchDirectory: (path, callback) => keep(folders, path, callback, isOurs(path)),
    report,
    refresh: () => {
      const changed = newer(files, (path) => isOurs(path) && !path.includes("/node_modules/"));
      for (const path of changed) report(path);
      // A new or removed file beside the notebook can change what an import means.
      for (const path of newer(folders, isOurs)) folders.get(path)?.callback(`${path}/package.json`);
      return changed;
    },
  };
}

function keep<C>(map: Map<string, Watched<C>>, path: string, callback: C, stamped: boolean): ts.FileWatcher {
  const watched = { callback, stamp: stamped ? stampOf(path) : 0 };
  map.set(path, watched);
  return {
    close: () => {
      if (map.get(path) === watched) map.delete(path);
    },
  };
}

function newer<C>(map: Map<string, Watched<C>>, isWanted: (path: string) => boolean): string[] {
  const changed: string[] = [];
  for (const [path, watched] of map) {
    if (!isWanted(path)) continue;
    const stamp = stampOf(path);
    if (stamp !== watched.stamp) changed.push(path);
    watched.stamp = stamp;
  }
  return changed;
}

function stampOf(path: string): number {
  const stat = statSync(path, { throwIfNoEntry: false });
  return stat === undefined ? 0 : stat.mtimeMs + stat.size;
}
