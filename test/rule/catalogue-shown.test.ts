import { expect, test } from "vitest";
import { changePoint, cycles, explain, recurrence, rules } from "../../kernel-helpers/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";

test("the catalogue shows itself as a table of all its rules", async () => {
  const text = String((await bundleOf(rules))?.["text/plain"]);
  for (const name of Object.keys(rules)) expect(text).toContain(`rules.${name}(`);
  expect(text).toContain("ΔB = r*B*(1 - B/K) - C");
});

test("commands without what they need ask for it in words", () => {
  const quadratic = recurrence("x[t+1] = 3.2*x*(1 - x)");
  expect(() => cycles(quadratic, undefined as never)).toThrow("Write `period: 2`");
  expect(() => cycles(quadratic, {} as never)).toThrow("Write `period: 2`");
  expect(() => changePoint(undefined as never, undefined as never)).toThrow("needs a rule");
  expect(() => changePoint(quadratic, undefined as never)).toThrow("needs observations");
  expect(() => explain(undefined as never)).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The \`word\` of \`explain\` must be a word of the trade; nothing was given. Write \`explain("fill rate")\`.]`,
  );
});
