import { copyFileSync, cpSync, mkdtempSync, readdirSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { browserThere, openBrowser } from "./browser.js";
import { type NotebookServer, notebookServerThere, startNotebookServer } from "./notebook-server.js";

// Source: Debian's classic notebook (jupyter-notebook 6.4) opens each worked notebook and runs all its cells.
const notebooks = join(import.meta.dirname, "..", "..", "notebooks");
const worked = readdirSync(notebooks).filter((name) => name.endsWith(".ipynb"));

describe.skipIf(!browserThere || !notebookServerThere)("the classic notebook", () => {
  const folder = mkdtempSync(join(tmpdir(), "periodwise-worked-"));
  let server: NotebookServer;
  let browser: Browser;

  beforeAll(async () => {
    cpSync(join(notebooks, "data"), join(folder, "data"), { recursive: true });
    for (const name of worked) copyFileSync(join(notebooks, name), join(folder, name));
    [server, browser] = await Promise.all([startNotebookServer(folder), openBrowser()]);
  });

  afterAll(async () => {
    await browser?.close();
    await server?.stop();
    rmSync(folder, { recursive: true, force: true });
  });

  test.each(worked)("runs every cell of %s", { timeout: 180_000 }, async (name) => {
    const page = await browser.newPage({ viewport: { width: 1280, height: 900 } });
    await page.goto(`${server.url}/notebooks/${name}`);
    await page.locator(".kernel_idle_icon").waitFor({ timeout: 60_000 });
    await page.getByText("Cell", { exact: true }).first().click();
    await page.locator("#run_all_cells a").click();
    await page.getByText("To rerun this case").first().waitFor({ timeout: 120_000 });
    expect(await page.locator(".output_error").count()).toBe(0);
    expect(await page.locator(".pw-figure").count()).toBeGreaterThan(0);
    await page.close();
  });
});
