import { existsSync, realpathSync } from "node:fs";
import { createRequire } from "node:module";
import { dirname, join } from "node:path";

/** A package that every cell can import from any folder: the kernel's own copy of it. */
export interface BundledPackage {
  readonly name: string;
  readonly folder: string;
  /** The file that `require` loads. */
  readonly program: string;
  /** The declarations that cells are checked against. */
  readonly types: string;
}

const names = ["periodwise", "danfojs-node"];

/** The folder that holds this installation's package.json. */
export function installationFolder(from: string = __dirname): string {
  if (existsSync(join(from, "package.json"))) return from;
  return installationFolder(dirname(from));
}

/** The packages available to every cell. */
export function bundledPackages(): readonly BundledPackage[] {
  const require = createRequire(__filename);
  return names.flatMap((name) => {
    const found = folderOf(name, require);
    if (found === undefined) return [];
    // The compiler knows files by their real paths.
    const folder = realpathSync(found);
    const { main, types } = require(join(folder, "package.json")) as { main: string; types: string };
    return [{ name, folder, program: join(folder, main), types: join(folder, types) }];
  });
}

function folderOf(name: string, require: NodeJS.Require): string | undefined {
  if (name === "periodwise") return installationFolder();
  const places = require.resolve.paths(name) ?? [];
  return places.map((place) => join(place, name)).find((folder) => existsSync(join(folder, "package.json")));
}
