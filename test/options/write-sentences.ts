import { readFileSync, writeFileSync } from "node:fs";
import ts from "typescript";
import type { DescribedField } from "./described-fields.js";

const width = 110;

/** Writes the sentences of the schema above the fields of the types. */
export function writeSentences(fields: readonly DescribedField[]): void {
  const byPlace = new Map<string, Map<number, DescribedField>>();
  for (const field of fields) {
    const file = field.declaration.getSourceFile().fileName;
    const places = byPlace.get(file) ?? new Map<number, DescribedField>();
    const other = places.get(field.declaration.pos);
    if (other !== undefined && other.field.says !== field.field.says)
      throw new Error(`${file}, ${field.name}: "${other.field.says}" and "${field.field.says}"`);
    byPlace.set(file, places.set(field.declaration.pos, field));
  }
  for (const [file, places] of byPlace) {
    const last = [...places.values()].sort((a, b) => b.declaration.pos - a.declaration.pos);
    writeFileSync(file, last.reduce(withSentence, readFileSync(file, "utf8")));
  }
}

function withSentence(text: string, { name, declaration, field }: DescribedField): string {
  const [comment] = ts.getJSDocCommentsAndTags(declaration);
  const end = declaration.getStart();
  const begin = comment?.pos ?? end;
  const indent = /[^\n]*$/.exec(text.slice(0, begin))![0];
  if (indent.trim() !== "") throw new Error(`Begin a line with ${name} for a comment above it: ${indent}`);
  return `${text.slice(0, begin)}${commentOf(field.says, indent)}\n${indent}${text.slice(end)}`;
}

function commentOf(says: string, indent: string): string {
  const short = `/** ${says} */`;
  if (indent.length + short.length <= width) return short;
  const lines = [""];
  for (const word of says.split(" ")) {
    const longer = `${lines.at(-1)} ${word}`;
    if (indent.length + 2 + longer.length > width) lines.push(` ${word}`);
    else lines[lines.length - 1] = longer;
  }
  return ["/**", ...lines.map((line) => `${indent} *${line}`), `${indent} */`].join("\n");
}
