import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { browserThere, openBrowser } from "./browser.js";
import { type NotebookServer, notebookServerThere, startNotebookServer } from "./notebook-server.js";

// Source: Debian's classic notebook (jupyter-notebook 6.4) is driven as its user drives it, by keys and menus.
const notebook = {
  nbformat: 4,
  nbformat_minor: 5,
  metadata: {
    kernelspec: { name: "periodwise", display_name: "Periodwise (TypeScript)", language: "typescript" },
  },
  cells: [{ id: "first", cell_type: "code", metadata: {}, source: "", outputs: [], execution_count: null }],
};
const canRun = browserThere && notebookServerThere;
const patience = 20_000;

describe.skipIf(!canRun)("the classic notebook", () => {
  const folder = mkdtempSync(join(tmpdir(), "periodwise-classic-"));
  let server: NotebookServer;
  let browser: Browser;
  let page: Page;

  beforeAll(async () => {
    writeFileSync(join(folder, "case.ipynb"), JSON.stringify(notebook));
    [server, browser] = await Promise.all([startNotebookServer(folder), openBrowser()]);
    page = await browser.newPage({ viewport: { width: 1280, height: 900 } });
    await page.goto(`${server.url}/notebooks/case.ipynb`);
    await page.locator(".kernel_idle_icon").waitFor({ timeout: patience });
  });

  afterAll(async () => {
    await browser?.close();
    await server?.stop();
    rmSync(folder, { recursive: true, force: true });
  });

  const lastCell = () => page.locator(".code_cell").last();
  const type = async (text: string): Promise<void> => {
    await lastCell().locator(".CodeMirror").click();
    await page.keyboard.type(text);
  };
  const menu = async (entry: string): Promise<void> => {
    await page.getByText("Kernel", { exact: true }).first().click();
    await page.locator(entry).click();
  };
  const outputOf = (index: number) => page.locator(".code_cell").nth(index).locator(".output_area");

  test("runs a cell that was typed", async () => {
    await type("const owed = 1200;\nowed * 2");
    await page.keyboard.press("Shift+Enter");
    await outputOf(0).getByText("2400").waitFor({ timeout: patience });
  });

  test("completes a name from an earlier cell", async () => {
    await type("owe");
    await page.keyboard.press("Tab");
    // One match is put in at once; several would be offered in a list.
    await lastCell().locator(".CodeMirror-code").getByText("owed").waitFor({ timeout: patience });
    await page.keyboard.type(" + 1");
    await page.keyboard.press("Shift+Enter");
    await outputOf(1).getByText("1201").waitFor({ timeout: patience });
  });

  test("shows an error with its place", async () => {
    await type("const wrong: string = owed;");
    await page.keyboard.press("Shift+Enter");
    await outputOf(2).getByText("not assignable").first().waitFor({ timeout: patience });
    expect(await outputOf(2).textContent()).toContain("^^^^^");
  });

  test("interrupts a loop and goes on", async () => {
    await type("for (;;) {}");
    await page.keyboard.press("Shift+Enter");
    await page.locator(".kernel_busy_icon").waitFor({ timeout: patience });
    await menu("#int_kernel a");
    await outputOf(3).getByText("Interrupted").first().waitFor({ timeout: patience });
    await type("owed + 2");
    await page.keyboard.press("Shift+Enter");
    await outputOf(4).getByText("1202").waitFor({ timeout: patience });
  });

  test("restarts, and knows nothing of what was", async () => {
    await menu("#restart_kernel a");
    await page.locator(".modal-dialog .btn-danger").click();
    await page.locator(".modal-dialog").waitFor({ state: "hidden" });
    await page.locator(".kernel_idle_icon").waitFor({ timeout: patience });
    await type("owed");
    await page.keyboard.press("Shift+Enter");
    await outputOf(5).getByText("Cannot find name 'owed'").first().waitFor({ timeout: patience });
  });
});
