import { expect, test } from "vitest";
import { look } from "../../kernel-helpers/tables/look.js";
import { contrast } from "../figures/colour-measures.js";

// Source: W3C, Web Content Accessibility Guidelines 2.1, success criterion 1.4.3: at least 4.5 to 1 for text.
test.each([
  ["ink", "paper"],
  ["ink", "shade"],
  ["quiet", "paper"],
  ["quiet", "shade"],
  ["accent", "paper"],
] as const)("%s on %s is read at 4.5 to 1 or better", (text, ground) => {
  expect(contrast(look[text], look[ground])).toBeGreaterThanOrEqual(4.5);
});
