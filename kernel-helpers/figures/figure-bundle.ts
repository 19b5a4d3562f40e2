import { type Bundle, tableText } from "../tables/index.js";
import { drawPicture } from "./draw-picture.js";
import type { Figure } from "./figure.js";
import { figureHtml, widths } from "./figure-html.js";
import { libraryOnce } from "./figure-library.js";
import { figureText } from "./figure-text.js";
import { numbersBehind } from "./numbers-behind.js";
import { plotSpec } from "./plot-spec.js";
import { thinningNotes } from "./thinning-notes.js";

/** A figure for every front end: a live plot, a picture, and the numbers as text. */
export async function figureBundle(figure: Figure): Promise<Bundle> {
  const numbers = figure.numbers ?? numbersBehind(figure);
  const notes = [...figure.notes, ...thinningNotes(figure)];
  const library = libraryOnce();
  const png = await drawPicture(plotSpec(figure, widths.wide, true));
  const picture = png && Buffer.from(png).toString("base64");
  return {
    "text/html": await figureHtml({ figure, numbers, notes, picture, library }),
    ...(picture ? { "image/png": picture } : {}),
    "text/plain": figureText(figure, numbers.map(tableText), notes),
  };
}
