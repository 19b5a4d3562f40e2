import { readFileSync } from "node:fs";
import { createRequire } from "node:module";

/**
 * The plotting library as a script element that draws the figures of the page. Each figure adds a function to
 * `window.periodwiseFigures`; the library calls them and remains available as `window.periodwisePlot`.
 */
export function figureLibrary(): string {
  const file = createRequire(__filename).resolve("plotly.js-basic-dist-min");
  const code = readFileSync(file, "utf8").replace(/<(?=\/script|!--)/gi, "\\x3C");
  return `<script>(function(define,module,exports){
${code}
;window.periodwisePlot=window.Plotly;
(window.periodwiseFigures||[]).splice(0).forEach(function(draw){draw(window.periodwisePlot)})}).call(window)</script>`;
}
