import { createRequire } from "node:module";
import type ts from "typescript-cell";
import { expect, test } from "vitest";
import { helpText } from "../../kernel-helpers/options/index.js";
import { compilerPath } from "../../src/kernel/cells/compiler-library.js";
import type { Message } from "../../src/kernel/index.js";
import { inspect } from "../../src/kernel/requests/inspect.js";
import type { KernelState } from "../../src/kernel/requests/kernel-state.js";

const library = createRequire(import.meta.url)(compilerPath) as typeof ts;

/** What a front end shows of a name, when the compiler takes it for a part of this kind. */
async function shown(name: string, kind: string): Promise<string> {
  const info = {
    displayParts: [{ text: name, kind }],
    documentation: [{ text: "The docstring.", kind: "text" }],
  };
  const kernel = {
    session: () => ({ compiler: { library, inspect: () => info }, declarations: () => "" }),
    languages: async () => [],
    functionHelp: async (known: string) => helpText(known),
  };
  const request = { content: { code: name, cursor_pos: 1, detail_level: 0 } };
  const reply = await inspect(kernel as unknown as KernelState, request as unknown as Message);
  return String((reply as { data: Record<string, unknown> }).data["text/markdown"]);
}

test("the help of an imported function lists its options, with choices, and a call", async () => {
  const help = await shown("forecast", "aliasName");
  expect(help).toContain("The docstring.\n\n*options*");
  expect(help).toMatch(/^- `periods` \(required\): [A-Z].*\.$/m);
  expect(help).toMatch(/^- `signal`: [A-Z].*\.$/m);
  expect(help).toContain("*example*\n```typescript\nforecast(");
  expect(await shown("fit", "aliasName")).toContain(`One of "process", "observation"`);
});

test("other names get no help", async () => {
  expect(await shown("forecast", "functionName")).not.toContain("*options*");
  expect(await shown("other", "aliasName")).not.toContain("*options*");
});
