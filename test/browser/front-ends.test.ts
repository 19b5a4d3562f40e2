/// <reference lib="dom" />
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { figuresOfEveryKind } from "../figures/all-kinds.js";
import { browserThere, openBrowser, openPage } from "./browser.js";
import { figureCount, galleryNotebook } from "./gallery.js";
import { convert, frontEndsThere, type NotebookServer, startNotebookServer, trust } from "./jupyter.js";
import { overflow, seenFigures } from "./looked-at.js";

const titles = Object.values(figuresOfEveryKind).map(({ title }) => title);

describe.runIf(browserThere && frontEndsThere)(
  "what others show of a notebook with every kind of figure and table",
  () => {
    const folder = mkdtempSync(join(tmpdir(), "periodwise-front-ends-"));
    let browser: Browser;
    let server: NotebookServer | undefined;

    beforeAll(async () => {
      const notebook = await galleryNotebook();
      const write = (name: string, cells: object[]): void => {
        writeFileSync(join(folder, `${name}.ipynb`), JSON.stringify({ ...notebook, cells }));
      };
      write("trusted", notebook.cells);
      write("untrusted", [
        ...notebook.cells,
        { cell_type: "markdown", id: "end", metadata: {}, source: "End." },
      ]);
      write("empty", notebook.cells.slice(0, 1));
      trust(folder, "trusted");
      browser = await openBrowser();
    });
    afterAll(async () => {
      await browser?.close();
      server?.stop();
      rmSync(folder, { recursive: true, force: true });
    });

    test.each([1280, 375])(
      "the converter's HTML at %i pixels has live plots, without an error or a request",
      async (width) => {
        const { page, errors, outside } = await openPage(
          browser,
          pathToFileURL(convert(folder, "trusted")).href,
          width,
        );
        await page.waitForFunction(
          (count) => document.querySelectorAll(".pw-live .main-svg").length >= count,
          figureCount,
        );
        const seen = await seenFigures(page);
        expect(seen.slice(0, titles.length).map(({ title }) => title)).toEqual(titles);
        expect((await overflow(page)).texts).toEqual([]);
        // The page's typesetter leaves alone what stands between two dollar signs.
        await page.waitForTimeout(1000);
        expect(
          await page.locator(".pw-figure .MathJax, .pw-table .MathJax, .pw-figure mjx-container").count(),
        ).toBe(0);
        expect({ errors, outside }).toEqual({ errors: [], outside: [] });
        await page.close();
      },
    );

    test("the classic notebook shows live plots when it trusts the notebook, and pictures when it does not", async () => {
      server = await startNotebookServer(folder);
      // What the front end itself logs, with no figure in the notebook.
      const empty = await openPage(browser, server.url("empty"), 1280);
      await empty.page.waitForSelector(".text_cell_render h1");
      await empty.page.waitForTimeout(1000);
      const itself = new Set(empty.errors.map(withoutStamp));
      await empty.page.close();

      const trusted = await openPage(browser, server.url("trusted"), 1280);
      await trusted.page.waitForFunction(
        (count) => document.querySelectorAll(".pw-live .main-svg").length >= count,
        figureCount,
      );
      const live = await seenFigures(trusted.page);
      expect(live.slice(0, titles.length).map(({ title }) => title)).toEqual(titles);
      expect((await overflow(trusted.page)).texts).toEqual([]);
      expect(trusted.errors.map(withoutStamp).filter((error) => !itself.has(error))).toEqual([]);
      expect(trusted.outside).toEqual([]);
      await trusted.page.close();

      const untrusted = await openPage(browser, server.url("untrusted"), 1280);
      await untrusted.page.waitForSelector(".output_html img");
      const still = await seenFigures(untrusted.page);
      expect(still).toHaveLength(figureCount);
      for (const { picture, drawn, alternative } of still) {
        expect({ picture, drawn }).toEqual({ picture: true, drawn: [] });
        expect(alternative).toContain("Horizontal axis:");
      }
      expect(await untrusted.page.locator(".output_html table th").first().textContent()).not.toBe("");
      expect(await untrusted.page.locator("img[src=x]").count()).toBe(0);
      expect(untrusted.errors.map(withoutStamp).filter((error) => !itself.has(error))).toEqual([]);
      await untrusted.page.close();
    }, 180_000);
  },
);

function withoutStamp(error: string): string {
  return error.replace(/\?v=\d+/g, "").replace(/:\d+\//g, "/");
}
