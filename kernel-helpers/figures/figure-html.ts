import {
  escapeHtml,
  oneLine,
  superscript,
  type Table,
  tableHtml,
  theme,
  typeface,
  untypeset,
} from "../tables/index.js";
import type { Figure } from "./figure.js";
import { describeFigure } from "./figure-description.js";
import { plotSpec } from "./plot-spec.js";

/** Layout widths for wide and narrow screens, in pixels. */
export const widths: { readonly wide: number; readonly narrow: number } = { wide: 760, narrow: 240 };

/** The parts of a figure's HTML. */
export interface FigureParts {
  readonly figure: Figure;
  readonly numbers: readonly Table[];
  readonly notes: readonly string[];
  /** PNG as base64; undefined when it could not be drawn. */
  readonly picture: string | undefined;
  /** The plotting library's script element, or "". */
  readonly library: string;
}

/**
 * A figure as HTML: a picture, replaced by the interactive plot where scripts run and kept for print; its notes; and its
 * data, folded. The picture contains the title, so the script fills in the title of the page.
 */
export async function figureHtml({ figure, numbers, notes, picture, library }: FigureParts): Promise<string> {
  // Loaded with the first figure, not with the package.
  const { createHash } = await import("node:crypto");
  const title = escapeHtml(figure.title);
  const description = escapeHtml(describeFigure(figure).join(" "));
  const image = picture
    ? `<img class="pw-picture" src="data:image/png;base64,${picture}" alt="${title}. ${description}" style="max-width:100%;height:auto">`
    : "";
  const shownNotes = notes.map((note) => `<p dir="auto">${escapeHtml(superscript(note))}</p>`).join("");
  const plot = plotJson(figure);
  // Named by its content: the same figure shown twice is drawn twice, each time in the next empty box.
  const name = createHash("sha256").update(plot).digest("hex").slice(0, 16);
  return [
    `<div class="pw-figure pw-${name}${picture ? " pw-pictured" : ""} ${untypeset}">${figureStyle}`,
    `<div class="pw-title" dir="auto">${picture ? "" : title}</div>`,
    `<div class="pw-live" role="img" aria-label="${title}. ${description}"></div>${image}`,
    shownNotes === "" ? "" : `<div class="pw-notes">${shownNotes}</div>`,
    `<details><summary>Data of this figure</summary><p dir="auto">${description}</p>`,
    `${numbers.map(tableHtml).join("")}</details></div>`,
    `<script>(function(){var s=${plot},name="pw-${name}";${drawing}})()</script>${library}`,
  ].join("");
}

/** Data for the script: traces, a layout for each width, and the title, escaped for a script element. */
function plotJson(figure: Figure): string {
  const wide = plotSpec(figure, widths.wide, false);
  const narrow = plotSpec(figure, widths.narrow, false);
  return JSON.stringify({
    title: oneLine(figure.title),
    data: wide.data,
    wide: wide.layout,
    narrow: narrow.layout,
  })
    .replace(/</g, "\\u003c")
    .replace(/\u2028/g, "\\u2028")
    .replace(/\u2029/g, "\\u2029");
}

// The position of the script is unknown: a notebook page may run it from elsewhere.
const drawing = `
var box=document.querySelector("."+name+":not(.pw-drawn)");
if(!box)return;
box.classList.add("pw-drawn");
var live=box.querySelector(".pw-live");
function shape(){return live.clientWidth<560?"narrow":"wide"}
function layout(){var l=JSON.parse(JSON.stringify(s[shape()]));l.dragmode=shape()==="narrow"?false:"zoom";l.width=Math.max(220,Math.min(live.clientWidth||760,1000));return l}
function draw(plot){
box.classList.add("pw-shown");
box.querySelector(".pw-title").textContent=s.title;
var last=0;
function again(){var w=live.clientWidth;if(!w||w===last)return;last=w;plot.react(live,s.data,layout(),{displaylogo:false,displayModeBar:"hover",modeBarButtonsToRemove:["select2d","lasso2d","autoScale2d"]})}
again();
if(window.ResizeObserver)new ResizeObserver(function(){window.requestAnimationFrame(again)}).observe(live)
}
if(window.periodwisePlot)draw(window.periodwisePlot);
else(window.periodwiseFigures=window.periodwiseFigures||[]).push(draw)`.replace(/\n/g, "");

const box = ".pw-figure.pw-figure";
const figureStyle: string = `<style>
${box}{margin:.8em 0 1.2em;max-width:1000px;color:${theme.text};background:${theme.background};font-family:${typeface};font-size:14px;line-height:1.4;border-top:3px solid ${theme.accent};padding-top:.5em}
${box} .pw-title{display:none;font-weight:600;font-size:15px;overflow-wrap:anywhere}
${box} .pw-live{display:none;width:100%;overflow:hidden}
${box} .pw-picture{display:block;max-width:min(100%,${widths.wide}px);height:auto;margin:0}
${box}.pw-shown .pw-title,${box}.pw-shown .pw-live{display:block}
${box}.pw-shown .pw-picture{display:none}
${box} .pw-notes{color:${theme.mutedText};font-size:13px}
${box} .pw-notes p,${box} details p{margin:.2em 0;overflow-wrap:anywhere}
${box} summary{cursor:pointer;color:${theme.accent};font-size:13px;padding:.2em 0;display:list-item}
@media print{${box}{break-inside:avoid}${box}.pw-shown .pw-picture{display:block}${box}.pw-pictured .pw-live,${box}.pw-pictured .pw-title{display:none}${box} details:not([open]){display:none}}
</style>`;
