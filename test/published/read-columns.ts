import { readFileSync } from "node:fs";
import { join } from "node:path";

/** The columns of a comma-separated fixture of numbers, by name. */
export function readColumns(file: string): Readonly<Record<string, number[]>> {
  const [header, ...rows] = readFileSync(join(__dirname, "fixtures", file), "utf8")
    .trim()
    .split("\n");
  const cells = rows.map((row) => row.split(",").map(Number));
  return Object.fromEntries(header!.split(",").map((name, j) => [name, cells.map((row) => row[j]!)]));
}
