import { type Bundle, tableText } from "../tables/index.js";
import { downsamplingNotes } from "./downsampling-notes.js";
import type { Figure } from "./figure.js";
import { figureData } from "./figure-data.js";
import { figureHtml, widths } from "./figure-html.js";
import { figureText } from "./figure-text.js";
import { drawPicture } from "./picture-worker-client.js";
import { plotLibraryOnce } from "./plot-library.js";
import { plotSpec } from "./plot-spec.js";

/** The representations of a figure: interactive plot, picture, and data as text. */
export async function figureBundle(figure: Figure): Promise<Bundle> {
  const numbers = figure.numbers ?? figureData(figure);
  const notes = [...figure.notes, ...downsamplingNotes(figure)];
  const library = plotLibraryOnce();
  const png = await drawPicture(plotSpec(figure, widths.wide, true));
  const picture = png && Buffer.from(png).toString("base64");
  return {
    "text/html": await figureHtml({ figure, numbers, notes, picture, library }),
    ...(picture ? { "image/png": picture } : {}),
    "text/plain": figureText(figure, numbers.map(tableText), notes),
  };
}
