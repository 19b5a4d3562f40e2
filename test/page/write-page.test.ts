/// <reference lib="dom" />
import { JSDOM } from "jsdom";
import { describe, expect, test } from "vitest";
import type { ShownCell, ShownOutput } from "../../src/casework/page/shown-notebook.js";
import { writePage } from "../../src/casework/page/write-page.js";

const data = (bundle: Record<string, unknown>): ShownOutput => ({
  output_type: "display_data",
  data: bundle,
});
const code = (source: string, ...outputs: ShownOutput[]): ShownCell => ({
  cell_type: "code",
  source,
  outputs,
  execution_count: 3,
});
const markdown = (source: string): ShownCell => ({ cell_type: "markdown", source });

function read(...cells: ShownCell[]): Document {
  return new JSDOM(writePage({ cells }, { source: "case.ipynb" })).window.document;
}

test("title and question come first, then the answer, then the notebook", () => {
  const page = read(
    markdown("# Ferry loan: when is it over?\n\nWhat was lent."),
    code(
      "openCase()",
      data({
        "application/vnd.periodwise.case+json": { title: "Ferry loan", question: "When is it paid off?" },
        "text/plain": "drawn twice",
      }),
    ),
    code(
      "answer()",
      data({
        "application/vnd.periodwise.answer+json": { sentence: "In month 254." },
        "text/plain": "Answer: In month 254.",
      }),
    ),
  );
  const text = page.querySelector("main")?.textContent ?? "";
  const places = ["Ferry loan", "When is it paid off?", "In month 254.", "What was lent."].map((part) =>
    text.indexOf(part),
  );
  expect(places).toEqual([...places].sort((a, b) => a - b));
  expect(Math.min(...places)).toBeGreaterThanOrEqual(0);
  expect(text).not.toContain("drawn twice");
  expect(page.querySelectorAll("h1")).toHaveLength(1);
  expect(page.title).toBe("Ferry loan");
});

test("the first sentence of an answer stands out; intervals and cautions follow; progress is omitted", () => {
  const sentence = "In month 254. The interval is 250.5 to 258.";
  const page = read(
    code(
      "run()",
      data({ "application/vnd.periodwise.progress+json": {}, "text/plain": "Refits: 200 of 200" }),
    ),
    code(
      "answer()",
      data({
        "application/vnd.periodwise.answer+json": { sentence, cautions: ["Rivals differ."] },
        "text/plain": "",
      }),
    ),
  );
  const said = Array.from(page.querySelectorAll(".answer p")).map((p) => p.textContent);
  expect(said).toEqual(["In month 254.", "The interval is 250.5 to 258.", "Caution: Rivals differ."]);
  expect(page.querySelector("main")?.textContent).not.toContain("Refits");
});

describe("markdown", () => {
  test("HTML in it is shown as text, and only safe links are links", () => {
    const page = read(
      markdown(
        "Then <script>alert(1)</script> [run](javascript:alert(1)) [site](https://example.org) <b>x</b>",
      ),
    );
    expect(page.querySelectorAll("main script, main b")).toHaveLength(0);
    expect(Array.from(page.querySelectorAll("main a")).map((a) => a.getAttribute("href"))).toEqual([
      "https://example.org",
    ]);
    expect(page.querySelector("main")?.textContent).toContain("<script>alert(1)</script>");
  });

  test("a picture is shown if the notebook contains it, and named if it would be fetched", () => {
    const cell = {
      ...markdown("![plan](attachment:plan.png) ![far](https://example.org/a.png)"),
      attachments: { "plan.png": { "image/png": "AAAA" } },
    };
    const page = read(cell);
    expect(Array.from(page.querySelectorAll("main img")).map((img) => img.getAttribute("src"))).toEqual([
      "data:image/png;base64,AAAA",
    ]);
    expect(page.querySelector("main em")?.textContent).toBe("far");
  });
});

describe("outputs", () => {
  test("the richest displayable form is shown", () => {
    const page = read(
      code(
        "a",
        data({ "text/plain": "plain", "text/html": "<i>rich</i>" }),
        data({ "text/plain": "<only plain>" }),
      ),
    );
    expect(page.querySelector(".output i")?.textContent).toBe("rich");
    expect(page.querySelector(".output pre")?.textContent).toBe("<only plain>");
  });

  test("consecutive streams become one block without terminal colours", () => {
    const said = (text: string): ShownOutput => ({ output_type: "stream", name: "stdout", text });
    const page = read(code("a", said("one \u001b[31mred\u001b[0m\n"), said("two")));
    expect(Array.from(page.querySelectorAll(".output pre")).map((pre) => pre.textContent)).toEqual([
      "one red\ntwo",
    ]);
  });

  test("an error is shown as an error", () => {
    const page = read(
      code("a", {
        output_type: "error",
        ename: "ModelError",
        evalue: "no",
        traceback: ["\u001b[31mModelError\u001b[0m: no"],
      }),
    );
    expect(page.querySelector(".failed pre")?.textContent).toBe("ModelError: no");
  });
});

test("the plotting library is on the page once, with or without a copy in the notebook", () => {
  const library = '<script data-periodwise="library">/*library of the notebook*/</script>';
  const figure = '<div class="pw-figure"></div>';
  const html = writePage({
    cells: [code("a", data({ "text/html": figure + library })), code("b", data({ "text/html": figure }))],
  });
  expect(html).not.toContain("library of the notebook");
  expect(html.match(/window\.periodwisePlot=/g)).toHaveLength(1);
  expect(writePage({ cells: [markdown("no figure")] })).not.toContain("periodwisePlot");
});

test("a page fetches nothing, by its content security policy, and is the same for the same notebook", () => {
  const cells = [markdown("# A"), code("1 < 2", data({ "text/plain": "true" }))];
  const html = writePage({ cells });
  expect(html).toContain("default-src 'none'");
  expect(html).not.toMatch(/(src|href)="(https?:)?\/\//);
  expect(writePage({ cells })).toBe(html);
});
