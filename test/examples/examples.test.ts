/**
 * Runs the `@example` of every docstring, and compares its value with what the example says behind `//` where that
 * is an expression.
 *
 * An example sees the whole public list, the list of its own room, and the values of `scope.ts`.
 */
import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join, relative } from "node:path";
import { pathToFileURL } from "node:url";
import ts from "typescript";
import { beforeEach, describe, expect, test } from "vitest";
import * as periodwise from "../../kernel-helpers/index.js";
import { scope } from "./scope.js";

const root = join(import.meta.dirname, "..", "..");

// An example may change the number format, which lasts; the next one begins with the standard one.
beforeEach(() => {
  periodwise.numberFormat("standard");
});

interface Example {
  readonly title: string;
  readonly file: string;
  readonly code: string;
}

function sources(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const path = join(folder, entry.name);
    if (entry.isDirectory()) return entry.name === "stand-ins" ? [] : sources(path);
    return entry.name.endsWith(".ts") && !entry.name.endsWith(".d.ts") ? [path] : [];
  });
}

function examplesOf(file: string): Example[] {
  const text = readFileSync(file, "utf8");
  return [...text.matchAll(/\/\*\*(?:[^*]|\*(?!\/))*\*\//g)].flatMap(([comment], number) => {
    const body = comment.replace(/^\/\*\*|\*\/$/g, "").replace(/^[ \t]*\*[ \t]?/gm, "");
    const example = /@example\s([\s\S]*?)(?=\n@\w|$)/.exec(body)?.[1]?.trim();
    if (example === undefined) return [];
    return [{ title: `${relative(root, file)}, example ${number + 1}`, file, code: example }];
  });
}

/** The code with its last expression returned, and what the comment behind it says. */
function runnable(code: string): { body: string; said: string } {
  const said = /\/\/ ?([^\n]*)$/.exec(code)?.[1] ?? "";
  const plain = ts
    .transpileModule(code, { compilerOptions: { target: ts.ScriptTarget.ES2022 } })
    .outputText.trim();
  const tree = ts.createSourceFile("example.js", plain, ts.ScriptTarget.ES2022, true);
  const last = tree.statements.at(-1);
  const body =
    last && ts.isExpressionStatement(last)
      ? `${plain.slice(0, last.getStart())}return (${last.expression.getText()});`
      : plain;
  return { body, said };
}

const AsyncFunction = (async () => {}).constructor as new (
  ...parts: string[]
) => (...given: unknown[]) => unknown;

async function resultOf(body: string, names: Readonly<Record<string, unknown>>): Promise<unknown> {
  return new AsyncFunction(...Object.keys(names), body)(...Object.values(names));
}

/** What the comment says, where it is an expression of JavaScript; otherwise it is prose. */
async function expected(
  said: string,
  names: Readonly<Record<string, unknown>>,
): Promise<{ value: unknown } | undefined> {
  if (said === "") return undefined;
  try {
    return { value: await resultOf(`return (${said});`, names) };
  } catch {
    return undefined;
  }
}

/** Numbers to 12 digits, which is what an example prints of a double; typed arrays as lists. */
function plainly(value: unknown): unknown {
  if (typeof value === "number" && Number.isFinite(value)) return Number(value.toPrecision(12));
  if (ArrayBuffer.isView(value)) return Array.from(value as Float64Array, plainly);
  return Array.isArray(value) ? value.map(plainly) : value;
}

/** What the room of a file offers at its door. */
async function roomOf(file: string): Promise<Record<string, unknown>> {
  const [top, room] = relative(root, file).split("/");
  const door = join(root, top!, room!, "index.ts");
  return existsSync(door) ? ((await import(pathToFileURL(door).href)) as Record<string, unknown>) : {};
}

describe.each([["kernel-helpers"], ["src"]])("examples in %s", (folder) => {
  test.each(
    sources(join(root, folder))
      .flatMap(examplesOf)
      .map((example) => [example.title, example] as const),
  )("%s runs and says what it gives", async (_, { file, code }) => {
    const own = (await import(pathToFileURL(file).href)) as Record<string, unknown>;
    const names: Record<string, unknown> = {
      ...periodwise,
      ...(await roomOf(file)),
      ...(await scope()),
      ...own,
    };
    const { body, said } = runnable(code);
    for (const declared of body.matchAll(/\b(?:const|let)\s+\{?\s*([\w$, ]+)/g))
      for (const name of declared[1]!.split(",")) delete names[name.trim()];
    const value = await resultOf(body, names);
    const wanted = await expected(said, { ...names, ...(typeof value === "object" ? value : {}) });
    if (wanted !== undefined && value !== undefined) expect(plainly(value)).toEqual(plainly(wanted.value));
  });
});
