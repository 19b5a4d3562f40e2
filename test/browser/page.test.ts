/// <reference lib="dom" />
import { spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { ShownNotebook } from "../../src/casework/page/shown-notebook.js";
import { writePage } from "../../src/casework/page/write-page.js";
import { figuresOfEveryKind } from "../figures/all-kinds.js";
import { browserThere, openBrowser, openPage } from "./browser.js";
import { figureCount, galleryNotebook, tablesOfEveryKind } from "./gallery.js";
import { faintTexts, overflow, seenFigures } from "./looked-at.js";

const folder = mkdtempSync(join(tmpdir(), "periodwise-page-"));
const file = join(folder, "page.html");
const figures = Object.values(figuresOfEveryKind);

describe.runIf(browserThere)("our page, with every kind of figure and table", () => {
  let browser: Browser;

  beforeAll(async () => {
    writeFileSync(file, writePage((await galleryNotebook()) as unknown as ShownNotebook));
    browser = await openBrowser();
  });
  afterAll(async () => {
    await browser?.close();
    rmSync(folder, { recursive: true, force: true });
  });

  test.each([1280, 375])(
    "at %i pixels plots are live, nothing fails, is fetched or overflows",
    async (width) => {
      const { page, errors, outside } = await openPage(browser, pathToFileURL(file).href, width);
      await page.waitForFunction(
        (count) => document.querySelectorAll(".pw-live .main-svg").length >= count,
        figureCount,
      );
      const seen = await seenFigures(page);
      expect(seen.filter(({ picture }) => picture)).toEqual([]);
      expect(await overflow(page)).toEqual({ page: 0, texts: [] });
      expect({ errors, outside }).toEqual({ errors: [], outside: [] });
      await page.close();
    },
  );

  test("every figure has its own title, axis titles with units, and a text alternative", async () => {
    const { page } = await openPage(browser, pathToFileURL(file).href, 1280);
    await page.waitForFunction(
      (count) => document.querySelectorAll(".pw-live .main-svg").length >= count,
      figureCount,
    );
    const seen = await seenFigures(page);
    expect(seen.slice(0, figures.length).map(({ title }) => title)).toEqual(
      figures.map(({ title }) => title),
    );
    figures.forEach(({ panels, title }, i) => {
      // A title that is broken into lines has no space where it breaks.
      const drawn = (seen[i]?.drawn ?? []).join(" | ").replaceAll(" ", "");
      for (const axis of panels.flatMap(({ x, y }) => [x, y])) {
        expect(drawn).toContain(axis.title.replaceAll(" ", ""));
        if (axis.unit) expect(drawn).toContain(axis.unit.replace("10^4", "10⁴").replaceAll(" ", ""));
      }
      expect(seen[i]?.alternative).toContain(title);
      expect(seen[i]?.alternative).toContain("Horizontal axis:");
    });
    expect(await page.locator(".pw-figure details table").count()).toBeGreaterThanOrEqual(figureCount);
    await page.close();
  });

  test("every text, in plots too, stands out at 4.5 to 1", async () => {
    const { page } = await openPage(browser, pathToFileURL(file).href, 1280);
    await page.waitForFunction(
      (count) => document.querySelectorAll(".pw-live .main-svg").length >= count,
      figureCount,
    );
    await page.evaluate(() => {
      for (const folded of Array.from(document.querySelectorAll("details"))) folded.open = true;
    });
    expect(await faintTexts(page, 4.5)).toEqual([]);
    await page.close();
  });

  test("tables show their title, every heading with its unit, their notes, and copy as tab-separated text", async () => {
    const { page } = await openPage(browser, pathToFileURL(file).href, 1280);
    const box = page.locator(".output > .pw-table").first();
    const made = tablesOfEveryKind["every column"];
    expect(await box.locator(".pw-title").textContent()).toBe(made?.title);
    expect(await box.locator("th").allTextContents()).toContain("Level (10⁴ cells/mL)");
    expect(await box.locator("tfoot td").first().textContent()).toBe("Sum");
    expect(await box.locator(".pw-notes").textContent()).toContain("a flat profile");
    await box.locator("pw-copy").click();
    expect(await box.locator("pw-copy").getAttribute("data-said")).toBe("Copied");
    await page.close();
  });

  test("hostile texts neither run nor become elements", async () => {
    const { page } = await openPage(browser, pathToFileURL(file).href, 1280);
    expect(await page.locator("img[src=x]").count()).toBe(0);
    expect(await page.locator("main").textContent()).toContain("<img src=x onerror=alert(1)></script><!--");
    await page.close();
  });

  test("where no script runs, every figure is a picture", async () => {
    const context = await browser.newContext({ javaScriptEnabled: false });
    const page = await context.newPage();
    await page.goto(pathToFileURL(file).href);
    // Locators work without scripts on the page; evaluation does not.
    const pictures = await page.locator("img.pw-picture").all();
    expect(pictures).toHaveLength(figureCount);
    for (const picture of pictures) expect((await picture.boundingBox())?.width).toBeGreaterThan(300);
    await context.close();
  });

  test("on paper every figure is its picture, and the text can be searched", async () => {
    const { page } = await openPage(browser, pathToFileURL(file).href, 1280);
    await page.waitForFunction(
      (count) => document.querySelectorAll(".pw-live .main-svg").length >= count,
      figureCount,
    );
    const pdf = join(folder, "page.pdf");
    await page.pdf({ path: pdf, format: "A4" });
    await page.close();
    if (!existsSync("/usr/bin/pdfimages") && process.env["CI"] === undefined) return;
    const images = spawnSync("pdfimages", ["-list", pdf], { encoding: "utf8" })
      .stdout.split("\n")
      .slice(2)
      .filter(Boolean);
    expect(images.length).toBeGreaterThanOrEqual(figureCount);
    const text = spawnSync("pdftotext", [pdf, "-"], { encoding: "utf8" }).stdout;
    expect(text).toContain("Every kind of column");
    expect(text).not.toContain("Data of this figure");
  });
});
