/**
 * One idea has one word, the standard one. The lists are the project's own choice of words, without an outside source.
 */
import { execFileSync } from "node:child_process";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { shownStrings } from "./shown-strings.mjs";

/** Rooms whose strings have been read and reworded. */
const rooms = [
  ...["rule", "store", "kernel", "casework", "cli"].map((room) => `src/${room}`),
  ...["figures", "tables", "dataframe", "progress", "glossary", "wording"].map(
    (room) => `kernel-helpers/${room}`,
  ),
];

/** Words that the vocabulary replaces, and the word to use. */
const retired: readonly (readonly [RegExp, string])[] = [
  [/\bblam(e|es|ed)\b/i, "observation error, process error"],
  [/\breading error\b/i, "observation error"],
  [/\brest levels?\b/i, "equilibrium"],
  [/\b(foretell|foretold)\b/i, "predict"],
  [/\banew\b/i, "again, resample"],
  [/\b(hang|hangs) on\b/i, "depends on, sensitivity"],
  [/\bruns? away\b/i, "has no finite optimum"],
  [/\bbears? out\b/i, "confirm"],
  [/\b(told|perhaps|whoever|nobody|strangers?|laid)\b/i, "a plain statement"],
  [/\brefus(e|es|ed|al|als)\b/i, "error; what to type instead"],
  [/\b(cannot be (told|sought)|come to nothing|came to nothing|of its own making)\b/i, "a plain statement"],
  [/\bis no (name|number|date|column)\b/i, "is not a ..."],
  [/\bending\b/i, "file extension"],
  [/\bcommands\b/i, "functions"],
];

describe("the strings that users see", () => {
  const script = join(import.meta.dirname, "words.mjs");
  const lines = execFileSync(process.execPath, [script, ...rooms], { encoding: "utf8" }).split("\n");

  test("are found", () => expect(lines.length).toBeGreaterThan(1000));

  test.each(retired)("%s is not among them; the word is: %s", (pattern) => {
    expect(lines.filter((line) => pattern.test(line.split("\t")[1] ?? ""))).toEqual([]);
  });
});

describe("a string is listed", () => {
  const texts = (source: string): string[] => shownStrings(source, "sample.ts").map(({ text }) => text);

  test("where it has several words", () => {
    expect(texts('throw new Error("File not found.");')).toEqual(["File not found."]);
  });

  test("where it is a single word with a label", () => {
    expect(texts('const column = { key: "period", label: "Period", kind: "integer" };')).toEqual(["Period"]);
  });

  test("with the expressions that it contains, and theirs with it", () => {
    // biome-ignore lint/suspicious/noTemplateCurlyInString: the sample is source text
    const source = 'const message = `Row ${row}: ${empty ? "no value" : "not a number"}.`;';
    expect(texts(source)).toEqual([
      'Row {row}: {empty ? "no value" : "not a number"}.',
      "no value",
      "not a number",
    ]);
  });

  test("but not where only programs read it", () => {
    expect(
      texts('import { a } from "./some file.js"; text.split("and so on"); if (kind === "two words") {}'),
    ).toEqual([]);
    expect(texts('const html = "<b>two words</b>";')).toEqual([]);
  });
});
