import { readFileSync } from "node:fs";
import { createRequire } from "node:module";

const packages = createRequire(__filename);
let sent = false;

/**
 * The plotting library as one script element, the first time it is asked for in a session; "" afterwards.
 *
 * A notebook keeps it with its first figure; figures before and after find it, because they queue for it.
 */
export function libraryOnce(): string {
  if (sent) return "";
  sent = true;
  return libraryScript();
}

/** The next figure brings the library again: for a case that begins anew in the same session. */
export function libraryAgain(): void {
  sent = false;
}

/**
 * The library in a function whose arguments hide a page's module loader from it, which would take it away.
 * Then it draws what waits in the queue.
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
