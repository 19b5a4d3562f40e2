import { readFileSync } from "node:fs";
import { createRequire } from "node:module";

const packages = createRequire(__filename);
let sent = false;

/**
 * The plotting library as one script element on the first call of a session; "" afterwards.
 *
 * A notebook stores it with its first figure; all figures find it, because they queue for it.
 */
export function plotLibraryOnce(): string {
  if (sent) return "";
  sent = true;
  return libraryScript();
}

/** Makes the next figure include the library again, for a new case in the same session. */
export function resetPlotLibrary(): void {
  sent = false;
}

/**
 * The library inside a function whose arguments hide the module loader of the page, which would capture it. Then it
 * draws the queued figures.
 */
function libraryScript(): string {
  const code = readFileSync(packages.resolve("plotly.js-basic-dist-min"), "utf8").replace(
    /<(?=\/script|!--)/gi,
    "\\x3C",
  );
  return `<script data-periodwise="library">(function(define,module,exports){if(window.periodwisePlot)return;var kept=window.Plotly;
${code}
;window.periodwisePlot=window.Plotly;window.Plotly=kept;
(window.periodwiseFigures||[]).splice(0).forEach(function(draw){draw(window.periodwisePlot)})}).call(window)</script>`;
}
