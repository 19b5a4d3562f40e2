/// <reference lib="dom" />
import type { Page } from "playwright-core";

/** What a reader sees of one figure. */
export interface SeenFigure {
  readonly title: string;
  /** Texts drawn in the live plot. */
  readonly drawn: readonly string[];
  readonly picture: boolean;
  readonly alternative: string;
}

/** All figures on a page, in order. */
export function seenFigures(page: Page): Promise<SeenFigure[]> {
  return page.evaluate(() => {
    const visible = (element: Element | null): boolean =>
      element !== null && element.getClientRects().length > 0;
    return Array.from(document.querySelectorAll(".pw-figure")).map((box) => ({
      title: visible(box.querySelector(".pw-title"))
        ? (box.querySelector(".pw-title")?.textContent ?? "")
        : "",
      drawn: Array.from(box.querySelectorAll(".pw-live svg text")).map((text) => text.textContent ?? ""),
      picture: visible(box.querySelector("img")),
      alternative: box.querySelector("img")?.getAttribute("alt") ?? "",
    }));
  });
}

/** Pixels by which the page is wider than the screen, and texts of a plot that leave its picture. */
export function overflow(page: Page): Promise<{ page: number; texts: string[] }> {
  return page.evaluate(() => {
    const texts = Array.from(document.querySelectorAll(".pw-live")).flatMap((live) => {
      const frame = live.getBoundingClientRect();
      return Array.from(live.querySelectorAll("svg text"))
        .filter((text) => {
          const box = text.getBoundingClientRect();
          const hidden = getComputedStyle(text).opacity === "0" || box.width === 0;
          // Two pixels are left for the difference between a letter and its box.
          return (
            !hidden &&
            (box.left < frame.left - 2 ||
              box.right > frame.right + 2 ||
              box.top < frame.top - 2 ||
              box.bottom > frame.bottom + 2)
          );
        })
        .map((text) => text.textContent ?? "");
    });
    return { page: document.documentElement.scrollWidth - document.documentElement.clientWidth, texts };
  });
}
