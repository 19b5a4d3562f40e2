/** Adds the screen functions that the plotting library needs and jsdom lacks; text sizes are estimated. */
export function stubScreen(window: ScreenlessWindow): void {
  const { URL, Element, SVGElement, HTMLCanvasElement } = window;
  URL.createObjectURL = () => "blob:none";
  window.matchMedia = () => ({ matches: false, addListener() {}, removeListener() {} });
  HTMLCanvasElement.prototype["getContext"] = () => null;
  SVGElement.prototype["getBBox"] = textBox;
  SVGElement.prototype["getComputedTextLength"] = function (this: PageElement) {
    return textBox.call(this).width;
  };
  SVGElement.prototype["getTotalLength"] = lineLength;
  SVGElement.prototype["getPointAtLength"] = pointAlong;
  Element.prototype["getBoundingClientRect"] = function (this: PageElement) {
    const { x, y, width, height } = textBox.call(this);
    return { x, y, left: x, top: y, right: x + width, bottom: y + height, width, height };
  };
}

/** Bounding box of a text whose first line starts, is centred or ends at the origin, by its anchor. */
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

/** An average letter is about 0.6 times as wide as the font size, a bold one a little more. */
function letterWidth(element: PageElement): number {
  return fontSize(element) * (element.style?.fontWeight === "bold" ? 0.66 : 0.6);
}

/** Ends of a straight path, "M0,0L30,40": the only kind that is measured (for arrows). */
function lineEnds(element: PageElement): [number, number, number, number] {
  const numbers = (element.getAttribute("d") ?? "").match(/-?\d+(\.\d+)?(e-?\d+)?/g)?.map(Number) ?? [];
  const [x0 = 0, y0 = 0] = numbers;
  const [x1 = x0, y1 = y0] = numbers.slice(-2);
  return [x0, y0, x1, y1];
}

function lineLength(this: PageElement): number {
  const [x0, y0, x1, y1] = lineEnds(this);
  return Math.hypot(x1 - x0, y1 - y0);
}

function pointAlong(this: PageElement, distance: number): { x: number; y: number } {
  const [x0, y0, x1, y1] = lineEnds(this);
  const share = distance / (Math.hypot(x1 - x0, y1 - y0) || 1);
  return { x: x0 + share * (x1 - x0), y: y0 + share * (y1 - y0) };
}

/** The parts of a window that are used. */
export interface ScreenlessWindow {
  matchMedia: () => object;
  readonly URL: { createObjectURL: () => string };
  readonly Element: { readonly prototype: Record<string, unknown> };
  readonly SVGElement: { readonly prototype: Record<string, unknown> };
  readonly HTMLCanvasElement: { readonly prototype: Record<string, unknown> };
}

interface PageElement {
  readonly style?: { readonly fontSize?: string; readonly fontWeight?: string };
  getAttribute(name: string): string | null;
  readonly textContent: string | null;
  querySelectorAll(selector: string): Iterable<{ readonly textContent: string | null }>;
}
