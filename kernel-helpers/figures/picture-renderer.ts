import { readFile } from "node:fs/promises";
import { createRequire } from "node:module";
import { theme } from "../tables/index.js";
import { indexedPng } from "./indexed-png.js";
import { type ScreenlessWindow, stubScreen } from "./screen-stub.js";

/** Renders one plot as a PNG. */
export type DrawPicture = (
  data: readonly object[],
  layout: Readonly<Record<string, unknown>>,
) => Promise<Uint8Array>;

const zoom = 1.6;
const packages = createRequire(__filename);

/**
 * Loads the plotting library in a page without a screen, and draws a small plot so that the first real one is as fast as
 * later ones.
 */
export async function pictureRenderer(): Promise<DrawPicture> {
  const [{ JSDOM, VirtualConsole }, { Resvg }, library] = await Promise.all([
    import("jsdom"),
    import("@resvg/resvg-js"),
    readFile(packages.resolve("plotly.js-dist"), "utf8"),
  ]);
  const page = new JSDOM("<!doctype html><body></body>", {
    runScripts: "outside-only",
    // The library logs warnings about the missing screen.
    virtualConsole: new VirtualConsole(),
  });
  const window = page.window as PlotWindow;
  stubScreen(window);
  window.eval(library);
  const draw: DrawPicture = async (data, layout) => {
    const size = { width: Number(layout["width"]), height: Number(layout["height"]) };
    const svg = await window.Plotly.toImage(
      { data, layout },
      { format: "svg", imageDataOnly: true, ...size },
    );
    const options = {
      fitTo: { mode: "zoom", value: zoom },
      background: theme.background,
      font: { defaultFontFamily: "DejaVu Sans" },
    } as const;
    const { width, height, pixels } = new Resvg(svg, options).render();
    return indexedPng({ width, height, bytes: pixels });
  };
  await draw([{ type: "scatter", x: [0, 1], y: [0, 1], name: "a" }], { width: 200, height: 200 });
  return draw;
}

/** The page's window once the plotting library has run in it. */
interface PlotWindow extends ScreenlessWindow {
  eval(code: string): unknown;
  readonly Plotly: { toImage(plot: object, options: object): Promise<string> };
}
