// Builds noise-kernel.c into noise-kernel-bytes.ts. Needs clang 14 or later with its wasm linker (Debian: clang, lld).
// Run from any folder: node src/dynamics/noise/noise-kernel-build.mjs
import { execFileSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

const here = import.meta.dirname;
const folder = mkdtempSync(join(tmpdir(), "noise-kernel-"));
const built = join(folder, "kernel.wasm");
const exported = ["state_place", "values_place", "prepare", "normals", "factors"];
execFileSync("clang", [
  "--target=wasm32",
  "-O3",
  "-msimd128",
  "-mbulk-memory",
  "-ffp-contract=off",
  "-nostdlib",
  "-Wl,--no-entry",
  "-Wl,--strip-all",
  ...exported.map((name) => `-Wl,--export=${name}`),
  "-o",
  built,
  join(here, "noise-kernel.c"),
]);
const text = readFileSync(built).toString("base64");
rmSync(folder, { recursive: true });
const lines = text.match(/.{1,100}/g).map((line) => `  "${line}",`);
writeFileSync(
  join(here, "noise-kernel-bytes.ts"),
  `/** noise-kernel.c as WebAssembly, base64; made by noise-kernel-build.mjs. */\nexport const noiseKernelBytes: string = [\n${lines.join("\n")}\n].join("");\n`,
);
