import { readFile } from "node:fs/promises";
import { createRequire } from "node:module";
import { look } from "../tables/index.js";
import { indexedPng } from "./indexed-png.js";
import { type ScreenlessWindow, standInForScreen } from "./screen-stand-in.js";

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
    readFile(packages.resolve("plotly.js-dist"), "utf8"),
  ]);
  const page = new JSDOM("<!doctype html><body></body>", {
    runScripts: "outside-only",
    // What the library logs is about a screen that is not there.
    virtualConsole: new VirtualConsole(),
  });
  const window = page.window as PlotWindow;
  standInForScreen(window);
  window.eval(library);
  const draw: DrawPicture = async (data, layout) => {
    const size = { width: Number(layout["width"]), height: Number(layout["height"]) };
    const svg = await window.Plotly.toImage(
      { data, layout },
      { format: "svg", imageDataOnly: true, ...size },
    );
    const options = {
      fitTo: { mode: "zoom", value: zoom },
      background: look.paper,
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
