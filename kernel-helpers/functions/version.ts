import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";

/** The version in the package's own package.json, found from this file upwards. */
export function packageVersion(): string {
  for (let folder = __dirname; folder !== dirname(folder); folder = dirname(folder)) {
    const file = join(folder, "package.json");
    if (!existsSync(file)) continue;
    const told = JSON.parse(readFileSync(file, "utf8")) as { name?: string; version?: string };
    if (told.name === "periodwise" && told.version !== undefined) return told.version;
  }
  return "unknown";
}
