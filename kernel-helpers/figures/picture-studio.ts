import { readFile } from "node:fs/promises";
import { createRequire } from "node:module";

/** Draws one plot as a PNG. */
export type DrawPicture = (
  data: readonly object[],
  layout: Readonly<Record<string, unknown>>,
) => Promise<Uint8Array>;

const zoom = 1.6;
const packages = createRequire(__filename);

/**
 * Sets up the plotting library on a page without a screen, and draws one small plot so that the first real one
 * is as quick as the rest.
 */
export async function pictureStudio(): Promise<DrawPicture> {
  const [{ JSDOM, VirtualConsole }, { Resvg }, library] = await Promise.all([
    import("jsdom"),
    import("@resvg/resvg-js"),
    readFile(packages.resolve("plotly.js-basic-dist-min"), "utf8"),
  ]);
  const page = new JSDOM("<!doctype html><body></body>", {
    runScripts: "outside-only",
    // What the library logs is about a screen that is not there.
    virtualConsole: new VirtualConsole(),
  });
  const window = page.window as PageWindow;
  standIns(window);
  window.eval(library);
  const draw: DrawPicture = async (data, layout) => {
    const size = { width: Number(layout["width"]), height: Number(layout["height"]) };
    const svg = await window.Plotly.toImage(
      { data, layout },
      { format: "svg", imageDataOnly: true, ...size },
    );
    const options = {
      fitTo: { mode: "zoom", value: zoom },
      font: { defaultFontFamily: "DejaVu Sans" },
    } as const;
    return new Resvg(svg, options).render().asPng();
  };
  await draw([{ type: "scatter", x: [0, 1], y: [0, 1], name: "a" }], { width: 200, height: 200 });
  return draw;
}

/** What the plotting library asks of a screen and jsdom does not have; sizes of text are estimated. */
function standIns(window: PageWindow): void {
  const { URL, Element, SVGElement, HTMLCanvasElement } = window;
  URL.createObjectURL = () => "blob:none";
  window.matchMedia = () => ({ matches: false, addListener() {}, removeListener() {} });
  HTMLCanvasElement.prototype["getContext"] = () => null;
  SVGElement.prototype["getBBox"] = textBox;
  SVGElement.prototype["getComputedTextLength"] = function (this: PageElement) {
    return textBox.call(this).width;
  };
  Element.prototype["getBoundingClientRect"] = function (this: PageElement) {
    const { x, y, width, height } = textBox.call(this);
    return { x, y, left: x, top: y, right: x + width, bottom: y + height, width, height };
  };
}

/** The box of a text whose first line begins (or, by its anchor, centres or ends) at the origin. */
function textBox(this: PageElement): { x: number; y: number; width: number; height: number } {
  const spans = [...this.querySelectorAll("tspan.line")].map((span) => span.textContent ?? "");
  const lines = spans.length > 0 ? spans : [this.textContent ?? ""];
  const width = Math.max(...lines.map((line) => line.length)) * letterWidth(this);
  if (width === 0) return { x: 0, y: 0, width: 0, height: 0 };
  const size = fontSize(this);
  const anchor = this.getAttribute("text-anchor");
  const x = anchor === "middle" ? -width / 2 : anchor === "end" ? -width : 0;
  return { x, y: -0.8 * size, width, height: lines.length * size * 1.3 };
}

function fontSize(element: PageElement): number {
  return Number.parseFloat(element.style?.fontSize || "13") || 13;
}

/** A letter of a plain typeface is about six tenths as wide as it is high, a bold one a little more. */
function letterWidth(element: PageElement): number {
  return fontSize(element) * (element.style?.fontWeight === "bold" ? 0.66 : 0.6);
}

/** The little that is used of a page's window. */
interface PageWindow {
  eval(code: string): unknown;
  matchMedia: () => object;
  readonly URL: { createObjectURL: () => string };
  readonly Element: { readonly prototype: Record<string, unknown> };
  readonly SVGElement: { readonly prototype: Record<string, unknown> };
  readonly HTMLCanvasElement: { readonly prototype: Record<string, unknown> };
  readonly Plotly: { toImage(plot: object, options: object): Promise<string> };
}

interface PageElement {
  readonly style?: { readonly fontSize?: string; readonly fontWeight?: string };
  getAttribute(name: string): string | null;
  readonly textContent: string | null;
  querySelectorAll(selector: string): Iterable<{ readonly textContent: string | null }>;
}
