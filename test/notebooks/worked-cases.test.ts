import { readFileSync } from "node:fs";
import { expect, test } from "vitest";

interface Cell {
  readonly cell_type: string;
  readonly source: readonly string[];
}

test.each(["cultures", "debt", "stock-levels"])(
  "%s is a case in at most 40 lines of code that ends in an answer",
  (name) => {
    const text = readFileSync(`${import.meta.dirname}/../../notebooks/${name}.ipynb`, "utf8");
    const { cells } = JSON.parse(text) as { readonly cells: readonly Cell[] };
    const lines = cells
      .filter((cell) => cell.cell_type === "code")
      .flatMap((cell) => cell.source.join("").split("\n"))
      .filter((line) => line.trim() !== "");
    expect(lines.length).toBeLessThanOrEqual(40);
    expect(lines.at(-1)).toBe("closeCase();");
    expect(lines.some((line) => line.startsWith("answer("))).toBe(true);
    expect(lines.some((line) => line.startsWith("openCase("))).toBe(true);
  },
);
