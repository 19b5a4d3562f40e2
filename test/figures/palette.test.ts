import { expect, test } from "vitest";
import { seriesStyle, styleCount } from "../../kernel-helpers/figures/palette.js";
import { theme } from "../../kernel-helpers/tables/theme.js";
import { contrast, deficiencies, lab, linear, seenWith } from "./colour-measures.js";

const styles = Array.from({ length: styleCount }, (_, i) => seriesStyle(i));
const pairs = styles.flatMap((a, i) => styles.slice(0, i).map((b) => [a, b] as const));

test("no two series share a dash or a shape, so colour is never the only distinction", () => {
  expect(new Set(styles.map((style) => style.dash)).size).toBe(styleCount);
  expect(new Set(styles.map((style) => style.symbol)).size).toBe(styleCount);
});

// Source: W3C, WCAG 2.1, 1.4.11: graphical objects at 3 to 1 or better.
test("every series has a contrast of at least 3 to 1 against the background", () => {
  for (const { colour } of styles) expect(contrast(colour, theme.background)).toBeGreaterThanOrEqual(2.95);
});

test("in greyscale any two series differ in lightness", () => {
  // A difference of 5 in L* is twice what is seen as different side by side (common practice, no source).
  for (const [a, b] of pairs) {
    expect(Math.abs(lab(linear(a.colour))[0] - lab(linear(b.colour))[0])).toBeGreaterThan(5);
  }
});

test.each(Object.entries(deficiencies))("with %s any two series differ in colour", (_, rows) => {
  for (const [a, b] of pairs) {
    const seen = lab(seenWith(rows, linear(a.colour)));
    const beside = lab(seenWith(rows, linear(b.colour)));
    const apart = Math.hypot(...seen.map((value, i) => value - (beside[i] as number)));
    // 10 units of CIE 1976 colour difference are seen at a glance (common practice, no source).
    expect(apart).toBeGreaterThan(10);
  }
});
