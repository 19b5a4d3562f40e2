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

/** Texts of a page whose contrast with what is behind them is below a ratio. Source: W3C, WCAG 2.1, 1.4.3. */
export function faintTexts(page: Page, least: number): Promise<string[]> {
  return page.evaluate((ratio) => {
    const channels = (colour: string): number[] => (colour.match(/[\d.]+/g) ?? []).map(Number);
    const light = (colour: string): number => {
      const [red = 0, green = 0, blue = 0] = channels(colour).map((value) => {
        const share = value / 255;
        return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
      });
      return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
    };
    // The nearest ground that is not see-through; light veils over it make no difference that counts.
    const ground = (element: Element | null): string => {
      for (let at = element; at !== null; at = at.parentElement) {
        const colour = getComputedStyle(at).backgroundColor;
        if ((channels(colour)[3] ?? 1) > 0.5) return colour;
      }
      return "rgb(255,255,255)";
    };
    const spoken = (element: Element): boolean =>
      Array.from(element.childNodes).some(
        (node) => node.nodeType === 3 && (node.textContent ?? "").trim() !== "",
      );
    const texts = Array.from(document.querySelectorAll("main *")).filter(
      (element) => element.getClientRects().length > 0 && spoken(element) && !element.closest("script,style"),
    );
    const inPlot = (element: Element): boolean => element.closest("svg") !== null;
    return texts
      .filter((element) => {
        const style = getComputedStyle(element);
        if (style.opacity === "0" || style.visibility === "hidden") return false;
        const [dark = 0, bright = 0] = [
          light(inPlot(element) ? style.fill : style.color),
          light(ground(element)),
        ].sort((a, b) => a - b);
        return (bright + 0.05) / (dark + 0.05) < ratio;
      })
      .map((element) => `${element.tagName} ${(element.textContent ?? "").slice(0, 40)}`);
  }, least);
}
