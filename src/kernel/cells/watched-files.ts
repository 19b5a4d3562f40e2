import { statSync } from "node:fs";
import { dirname, join } from "node:path";
import type ts from "typescript-cell";

/**
 * Replaces the compiler's file watching. Nothing is watched in the background: before a cell is compiled, `refresh`
 * checks the files beside the notebook and reports those that changed, so that a cell always sees what is on disk.
 */
export interface WatchedFiles {
  readonly watchFile: NonNullable<ts.System["watchFile"]>;
  /** Reports changed files to the compiler; true when files were added or removed, so that imports may resolve differently. */
  readonly refresh: () => boolean;
  readonly report: (path: string) => void;
}

interface Watched {
  readonly callback: ts.FileWatcherCallback;
  stamp: number;
}

export function watchedFiles(library: typeof ts, folder: string): WatchedFiles {
  const files = new Map<string, Watched>();
  const folders = new Map([folder, join(folder, "node_modules")].map((path) => [path, stampOf(path)]));
  const isBeside = (path: string): boolean => path.startsWith(folder) && !path.includes("/node_modules/");
  const report = (path: string): void =>
    files.get(path)?.callback(path, library.FileWatcherEventKind.Changed);
  const reportChanged = (): void => {
    for (const [path, watched] of files) {
      const stamp = isBeside(path) ? stampOf(path) : watched.stamp;
      if (stamp === watched.stamp) continue;
      watched.stamp = stamp;
      report(path);
    }
  };
  const foldersChanged = (): boolean => {
    const changed = [...folders].filter(([path, stamp]) => stampOf(path) !== stamp);
    for (const [path] of changed) folders.set(path, stampOf(path));
    return changed.length > 0;
  };
  return {
    watchFile: (path, callback) => {
      const watched = { callback, stamp: isBeside(path) ? stampOf(path) : 0 };
      files.set(path, watched);
      if (isBeside(path) && !folders.has(dirname(path))) folders.set(dirname(path), stampOf(dirname(path)));
      return {
        close: () => {
          if (files.get(path) === watched) files.delete(path);
        },
      };
    },
    report,
    refresh: () => {
      reportChanged();
      return foldersChanged();
    },
  };
}

/** Changes whenever the file does; 0 for none. The time of a folder changes when entries are added or removed. */
function stampOf(path: string): number {
  const stat = statSync(path, { throwIfNoEntry: false });
  if (stat === undefined) return 0;
  return stat.isDirectory() ? stat.mtimeMs : stat.mtimeMs + stat.size;
}
