import { expect, test } from "vitest";
import { theme } from "../../kernel-helpers/tables/theme.js";
import { contrast } from "../figures/colour-measures.js";

// Source: W3C, Web Content Accessibility Guidelines 2.1, success criterion 1.4.3: at least 4.5 to 1 for text.
test.each([
  ["text", "background"],
  ["text", "shaded"],
  ["mutedText", "background"],
  ["mutedText", "shaded"],
  ["accent", "background"],
] as const)("%s on %s has a contrast of at least 4.5 to 1", (text, ground) => {
  expect(contrast(theme[text], theme[ground])).toBeGreaterThanOrEqual(4.5);
});
