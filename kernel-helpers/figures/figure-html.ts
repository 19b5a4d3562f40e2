import { escapeHtml, look, raised, type Table, tableHtml, typeface } from "../tables/index.js";
import type { Figure } from "./figure.js";
import { figureAccount } from "./figure-account.js";
import { plotSpec } from "./plot-spec.js";

/** Width for which a plot is laid out on a wide and on a narrow screen, in pixels. */
export const widths: { readonly wide: number; readonly narrow: number } = { wide: 760, narrow: 340 };

/** What a figure's HTML is put together from. */
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
 * A figure as HTML: a picture, replaced by the live plot where scripts run and kept for print; its notes; and the
 * numbers behind it, folded away.
 */
export function figureHtml({ figure, numbers, notes, picture, library }: FigureParts): string {
  const account = escapeHtml(figureAccount(figure).join(" "));
  const image = picture
    ? `<img class="pw-picture" src="data:image/png;base64,${picture}" alt="${escapeHtml(figure.title)}. ${account}" style="max-width:100%;height:auto">`
    : "";
  const shownNotes = notes.map((note) => `<p dir="auto">${escapeHtml(raised(note))}</p>`).join("");
  return [
    `<div class="pw-figure${picture ? " pw-pictured" : ""}">${figureStyle}`,
    `<div class="pw-title" dir="auto">${escapeHtml(figure.title)}</div>`,
    `<div class="pw-live" role="img" aria-label="${escapeHtml(figure.title)}. ${account}"></div>${image}`,
    shownNotes === "" ? "" : `<div class="pw-notes">${shownNotes}</div>`,
    `<details><summary>Numbers behind this figure</summary><p dir="auto">${account}</p>`,
    `${numbers.map(tableHtml).join("")}</details></div>`,
    `<script>${drawingScript(figure)}</script>${library}`,
  ].join("");
}

/** Finds its own box through the script element's place, so that no name need be unique in a notebook. */
function drawingScript(figure: Figure): string {
  const wide = plotSpec(figure, widths.wide, false);
  const narrow = plotSpec(figure, widths.narrow, false);
  const json = JSON.stringify({ data: wide.data, wide: wide.layout, narrow: narrow.layout })
    .replace(/</g, "\\u003c")
    .replace(/\u2028/g, "\\u2028")
    .replace(/\u2029/g, "\\u2029");
  return `(function(){var s=${json};${drawing}})()`;
}

const drawing = `
var box=document.currentScript&&document.currentScript.previousElementSibling;
if(!box||!box.classList.contains("pw-figure")){var all=document.querySelectorAll(".pw-figure:not(.pw-drawn)");box=all[all.length-1]}
if(!box)return;
box.classList.add("pw-drawn");
var live=box.querySelector(".pw-live");
function shape(){return live.clientWidth<560?"narrow":"wide"}
function layout(){var l=JSON.parse(JSON.stringify(s[shape()]));l.width=Math.max(260,Math.min(live.clientWidth||760,1000));return l}
function draw(plot){
box.classList.add("pw-shown");
var last=0;
function again(){var w=live.clientWidth;if(!w||w===last)return;last=w;plot.react(live,s.data,layout(),{displaylogo:false,displayModeBar:"hover",modeBarButtonsToRemove:["select2d","lasso2d","autoScale2d"]})}
again();
if(window.ResizeObserver)new ResizeObserver(function(){window.requestAnimationFrame(again)}).observe(live)
}
if(window.periodwisePlot)draw(window.periodwisePlot);
else(window.periodwiseFigures=window.periodwiseFigures||[]).push(draw)`.replace(/\n/g, "");

const box = ".pw-figure.pw-figure";
const figureStyle: string = `<style>
${box}{margin:.8em 0 1.2em;max-width:1000px;color:${look.ink};background:${look.paper};font-family:${typeface};font-size:14px;line-height:1.4;border-top:3px solid ${look.accent};padding-top:.5em}
${box} .pw-title{display:none;font-weight:600;font-size:15px;overflow-wrap:anywhere}
${box} .pw-live{display:none;width:100%;overflow:hidden}
${box} .pw-picture{display:block;max-width:min(100%,${widths.wide}px);height:auto;margin:0}
${box}.pw-shown .pw-title,${box}.pw-shown .pw-live{display:block}
${box}.pw-shown .pw-picture{display:none}
${box} .pw-notes{color:${look.quiet};font-size:13px}
${box} .pw-notes p,${box} details p{margin:.2em 0;overflow-wrap:anywhere}
${box} summary{cursor:pointer;color:${look.accent};font-size:13px;padding:.2em 0;display:list-item}
@media print{${box}{break-inside:avoid}${box}.pw-shown .pw-picture{display:block}${box}.pw-pictured .pw-live,${box}.pw-pictured .pw-title{display:none}${box} details:not([open]){display:none}}
</style>`;
