import { expect, test } from "vitest";
import { explain, rules } from "../../kernel-helpers/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";

test("the catalogue shows itself as a table of all its rules", async () => {
  const text = String((await bundleOf(rules))?.["text/plain"]);
  for (const name of Object.keys(rules)) expect(text).toContain(`rules.${name}(`);
  expect(text).toContain("ΔB = r*B*(1 - B/K) - C");
});

test("explain without a word asks for one", () => {
  expect(() => explain(undefined as never)).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: Which word? Give one of the trade, as in explain("fill rate").]`,
  );
});
