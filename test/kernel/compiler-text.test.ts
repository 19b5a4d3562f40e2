import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { compilerPath } from "../../src/kernel/cells/compiler-library.js";

// The kernel reads the compiler's text byte by byte, which is right as long as this holds.
test("the compiler's text has characters beyond ASCII only in comments", () => {
  const lines = readFileSync(compilerPath, "utf8").split("\n");
  const beyond = lines.filter((line) => [...line].some((character) => character.charCodeAt(0) > 127));
  const outside = beyond.filter((line) =>
    [...line.replace(/\/\/.*$/, "")].some((one) => one.charCodeAt(0) > 127),
  );
  expect(outside).toEqual([]);
});
