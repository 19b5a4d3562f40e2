/**
 * Prints every string that a person using Periodwise can see, one a line with its file, so that one reader can go
 * through the whole voice in an hour.
 *
 *   npm run words                     everything
 *   npm run words -- src/rule         one folder, or several
 *   npm run words -- --help-texts     docstrings of what a notebook can import
 */
import { readdirSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { helpTexts } from "./help-texts.mjs";
import { shownStrings } from "./shown-strings.mjs";

const root = join(dirname(fileURLToPath(import.meta.url)), "..", "..");

/** Files whose strings are programs: generated steps, TeX, style sheets, declarations. */
const programs =
  /^src\/rule\/(code|tex)\/|(page-style|signature|cell-globals|node-types|language-library)\.ts$/;

function sourceFiles(folder) {
  return readdirSync(join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    const path = join(folder, entry.name);
    if (entry.isDirectory()) return entry.name === "stand-ins" ? [] : sourceFiles(path);
    return /(?<!\.d)\.(ts|mjs)$/.test(entry.name) && !programs.test(path) ? [path] : [];
  });
}

function stringsIn(folders) {
  return folders
    .flatMap(sourceFiles)
    .flatMap((path) =>
      shownStrings(readFileSync(join(root, path), "utf8"), path).map((found) => ({ path, ...found })),
    );
}

const given = process.argv.slice(2);
const folders = given.filter((word) => !word.startsWith("--"));
const found = given.includes("--help-texts")
  ? helpTexts(root)
  : stringsIn(folders.length > 0 ? folders : ["src", "kernel-helpers"]);
for (const { path, line, text } of found) console.log(`${path}:${line}\t${text}`);
console.log(`${found.length} strings`);
