import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join, relative } from "node:path";
import { expect, test } from "vitest";

const root = join(import.meta.dirname, "..", "..");
const rooms = [
  ...["numeric", "record", "rule", "dynamics", "estimate", "projection", "evidence", "decision"].map((room) =>
    join("src", room),
  ),
  "kernel-helpers",
];
/** The one place that counts days and months. */
const owner = join("src", "record", "period");

/** What gives calendar arithmetic away. */
const signs: Readonly<Record<string, RegExp>> = {
  "the language's dates":
    /\bnew Date\(|\bDate\.(UTC|parse)\b|\.[gs]etUTC\w+\(|\.get(FullYear|Month|Date|Day)\(/,
  "the length of a day": /\b86_?400(_?000)?\b|24 \* 60 \* 60/,
  "the lengths of months": /31,\s*(28|29)(\.\d+)?,\s*31|\b365\.25?\b|\b30\.4\d*\b/,
  "parts of a date": /\.slice\(0, (4|7)\)[^\n]*-|\\d\{4\}\)?-\(?\\d\{2\}/,
};

/** Files of a tree that do calendar arithmetic outside the owner, with what gave them away. */
function found(tree: string): readonly string[] {
  const files = rooms.flatMap((room) => {
    try {
      return readdirSync(join(tree, room), { recursive: true, encoding: "utf8" }).map((file) =>
        join(room, file),
      );
    } catch {
      return [];
    }
  });
  return files
    .filter(
      (file) => /\.ts$/.test(file) && !file.startsWith(owner) && !/node_modules|stand-ins|dist/.test(file),
    )
    .flatMap((file) => {
      const text = readFileSync(join(tree, file), "utf8").replaceAll(/\/\*[\s\S]*?\*\/|\/\/.*/g, "");
      return Object.entries(signs)
        .filter(([, sign]) => sign.test(text))
        .map(([sign]) => `${relative(".", file)}: ${sign}`);
    });
}

test("days and months are counted in src/record/period and nowhere else", () => {
  expect(found(root)).toEqual([]);
});

test("a planted violation of each kind is found, and the owner's own files are not", () => {
  const tree = mkdtempSync(join(tmpdir(), "periodwise-calendar-"));
  const planted: Readonly<Record<string, string>> = {
    "src/record/period/moment.ts": "export const at: number = Date.UTC(2026, 0, 1);",
    "src/projection/labels.ts": "export const next = (t: number): number => new Date(t).getUTCMonth() + 1;",
    "src/decision/later.ts": "export const later = (t: number): number => t + 86_400_000;",
    "src/estimate/months.ts": "export const days: readonly number[] = [31, 28, 31, 30];",
    "kernel-helpers/figures/year.ts":
      "export const month = (iso: string): boolean => /^(\\d{4})-(\\d{2})/.test(iso);",
    "src/numeric/plain.ts": "// new Date() in a comment is no arithmetic\nexport const one: number = 1;",
  };
  for (const [file, text] of Object.entries(planted)) {
    mkdirSync(dirname(join(tree, file)), { recursive: true });
    writeFileSync(join(tree, file), text);
  }
  try {
    expect([...found(tree)].sort()).toEqual([
      "kernel-helpers/figures/year.ts: parts of a date",
      "src/decision/later.ts: the length of a day",
      "src/estimate/months.ts: the lengths of months",
      "src/projection/labels.ts: the language's dates",
    ]);
  } finally {
    rmSync(tree, { recursive: true, force: true });
  }
});
