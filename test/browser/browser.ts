import { existsSync } from "node:fs";
import { type Browser, chromium, type Page } from "playwright-core";

const program = process.env["CHROMIUM"] ?? "/usr/bin/chromium";

/** Tests that look at a page run where there is a browser; in CI a missing one is a failure, not a skip. */
export const browserThere: boolean = existsSync(program) || process.env["CI"] !== undefined;

/** A headless browser that asks nothing of the network by itself. */
export function openBrowser(): Promise<Browser> {
  const args = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run"];
  const quiet = ["--disable-background-networking", "--disable-component-update", "--disable-sync"];
  return chromium.launch({ executablePath: program, args: [...args, ...quiet] });
}

/** A page with what went wrong on it: errors on its console, and requests that leave the machine. */
export interface WatchedPage {
  readonly page: Page;
  readonly errors: string[];
  readonly outside: string[];
}

export async function openPage(browser: Browser, url: string, width: number): Promise<WatchedPage> {
  const page = await browser.newPage({ viewport: { width, height: 900 } });
  // A busy machine is no failure: the limit of the whole test says when it is stuck.
  page.setDefaultTimeout(55_000);
  const errors: string[] = [];
  const outside: string[] = [];
  page.on("pageerror", (error) => errors.push(error.message));
  page.on("console", (message) => {
    if (message.type() === "error") errors.push(message.text());
  });
  page.on("request", (request) => {
    const { protocol, hostname } = new URL(request.url());
    if (protocol.startsWith("http") && hostname !== "127.0.0.1") outside.push(request.url());
  });
  await page.goto(url, { waitUntil: "load" });
  return { page, errors, outside };
}
