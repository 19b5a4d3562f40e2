import { cellCompiler } from "./cell-compiler.js";
import { bundledPackages } from "./installation.js";

const sample = [
  "const level: number = 1;",
  "function next(n: number): number { for (let i = 0; i < 3; i++) n += i; return n; }",
  "[1, 2].map((n) => next(n) + level)",
].join("\n");

/** Compiles sample cells and saves the compiler cache, so that later starts are faster. */
export function warmUp(folder: string): void {
  const compiler = cellCompiler(folder, bundledPackages());
  let declarations = "";
  for (let round = 0; round < 5; round++) declarations = compiler.compile(declarations, sample).declarations;
  compiler.saveCache();
}
