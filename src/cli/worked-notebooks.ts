import { readdirSync } from "node:fs";
import { join, relative } from "node:path";
import { installationFolder } from "../kernel/index.js";

/** The notebooks of this checkout, sorted by name, as paths from the current folder. */
export function workedNotebooks(): readonly string[] {
  const folder = join(installationFolder(), "notebooks");
  const names = readdirSync(folder).filter((name) => name.endsWith(".ipynb"));
  return names.sort().map((name) => relative(process.cwd(), join(folder, name)));
}
