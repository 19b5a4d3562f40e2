import { escapeHtml, superscript, untypeset } from "../wording/index.js";
import { tabSeparated } from "./tab-separated.js";
import type { Table } from "./table.js";
import { type Cell, tableLayout } from "./table-layout.js";
import { theme, typeface } from "./theme.js";

/** With more rows the page would contain the record twice, so there is no copy button. */
const maxCopiedRows = 2000;

/** A table as HTML that scrolls inside its own box; only its copy button needs a script. */
export function tableHtml(table: Table): string {
  const layout = tableLayout(table);
  const head = `<tr>${layout.headings.map((cell) => cellHtml(cell, "th")).join("")}</tr>`;
  const rows = layout.rows.map((row) => `<tr>${row.map((cell) => cellHtml(cell, "td")).join("")}</tr>`);
  const span = `<tr><td class="pw-gap" colspan="${table.columns.length}">`;
  if (layout.truncatedAfter !== undefined) rows.splice(layout.truncatedAfter, 0, `${span}…</td></tr>`);
  if (rows.length === 0) rows.push(`${span}no rows</td></tr>`);
  const foot = layout.totals
    .map((row) => `<tr>${row.map((cell) => cellHtml(cell, "td")).join("")}</tr>`)
    .join("");
  const notes = layout.notes
    .map(({ mark, text }) => `<p dir="auto">${mark === "" ? "" : `<b>${mark}</b> `}${escapeHtml(text)}</p>`)
    .join("");
  return [
    `<div class="pw-table ${untypeset}">${tableStyle}<p class="pw-title" dir="auto">${escapeHtml(superscript(table.title))}</p>`,
    `<div class="pw-scroll"><table aria-label="${escapeHtml(superscript(table.title))}">`,
    `<thead>${head}</thead><tbody>${rows.join("")}</tbody>${foot === "" ? "" : `<tfoot>${foot}</tfoot>`}`,
    `</table></div>${notes === "" ? "" : `<div class="pw-notes">${notes}</div>`}${copyButton(table)}</div>`,
  ].join("");
}

function cellHtml({ text, mark, numeric }: Cell, tag: "th" | "td"): string {
  const shown = numeric ? numberHtml(text) : escapeHtml(text);
  const note = mark === "" ? "" : `<sup class="pw-mark">${mark}</sup>`;
  const scope = tag === "th" ? ' scope="col"' : "";
  return `<${tag}${scope} class="${numeric ? "pw-n" : "pw-t"}" dir="auto">${shown}${note}</${tag}>`;
}

/** With a typographic minus sign and powers of ten. */
function numberHtml(text: string): string {
  if (!/^[-<>]?[\d∞]/.test(text)) return escapeHtml(text);
  const power = /^(.*\d)e(-?\d+)$/.exec(text);
  const minus = (part: string): string => escapeHtml(part).replace(/^-/, "−");
  return power ? `${minus(power[1] ?? "")}×10<sup>${minus(power[2] ?? "")}</sup>` : minus(text);
}

/**
 * A custom element without text: where scripts are removed from a page, nothing of it remains, instead of a button that
 * does nothing.
 */
function copyButton(table: Table): string {
  if (table.rows.length > maxCopiedRows) return "";
  const copy =
    "var b=this,t=document.createElement('textarea');t.value=b.getAttribute('data-copy');" +
    "t.style.position='fixed';t.style.opacity=0;document.body.appendChild(t);t.select();" +
    "b.setAttribute('data-said',document.execCommand('copy')?'Copied':'Not copied');t.remove()";
  const text = escapeHtml(tabSeparated(table)).replace(/\n/g, "&#10;").replace(/\t/g, "&#9;");
  const keyed = "if(event.key==='Enter'||event.key===' '){event.preventDefault();this.click()}";
  return `<pw-copy role="button" tabindex="0" aria-label="Copy as tab-separated text" data-said="Copy" data-copy="${text}" onclick="${copy}" onkeydown="${keyed}"></pw-copy>`;
}

// Shadows at the sides of a table that is wider than its box; they are covered where it ends.
const cover = (side: string, to: string): string =>
  `linear-gradient(to ${to},${theme.background} 40%,transparent) ${side}/34px 100% no-repeat local`;
const shadow = (side: string, to: string): string =>
  `linear-gradient(to ${to},rgba(22,38,46,.28),transparent) ${side}/12px 100% no-repeat scroll`;
const scrollShadow = `background:${cover("left", "right")},${cover("right", "left")},${shadow("left", "right")},${shadow("right", "left")},${theme.background}`;

// Each selector repeats the class, to override the table styles of a notebook page.
const box = ".pw-table.pw-table";
const tableStyle: string = `<style>
${box}{margin:.8em 0 1em;color:${theme.text};font-family:${typeface};font-size:14px;line-height:1.4;max-width:100%}
${box} .pw-scroll{overflow-x:auto;max-width:100%;position:relative;${scrollShadow}}
${box} table{border-collapse:collapse;border:0;border-top:3px solid ${theme.accent};background:none;margin:0;font-size:14px;width:auto;table-layout:auto}
${box} .pw-title{font-weight:600;font-size:15px;margin:0 0 .35em;overflow-wrap:anywhere}
${box} th,${box} td{border:0;border-bottom:1px solid ${theme.border};padding:.32em .8em;vertical-align:baseline;max-width:min(28em,60vw);overflow-wrap:break-word;background:none;color:${theme.text};white-space:normal}
${box} thead th{font-weight:600;color:${theme.mutedText};background:rgba(11,90,107,.06);vertical-align:bottom;min-width:3.5em}
${box} .pw-n{text-align:right;font-variant-numeric:tabular-nums;white-space:nowrap}
${box} thead .pw-n{white-space:normal}
${box} .pw-n .pw-mark{position:absolute;margin-left:.1em}
${box} .pw-t{text-align:left}
${box} tbody tr,${box} tfoot tr{background:none}
${box} tfoot td{font-weight:600;border-top:2px solid ${theme.mutedText}}
${box} .pw-gap{text-align:center;color:${theme.mutedText}}
${box} .pw-notes{color:${theme.mutedText};font-size:13px;margin:.4em 0 0}
${box} .pw-notes p{margin:.15em 0;overflow-wrap:anywhere}
${box} pw-copy::before{content:attr(data-said)}
${box} pw-copy{display:inline-block;font:inherit;font-size:12px;color:${theme.accent};background:${theme.background};border:1px solid ${theme.border};border-radius:3px;padding:.1em .7em;margin:.4em 0 0;cursor:pointer}
@media print{${box} pw-copy{display:none}${box} tr{break-inside:avoid}${box} .pw-scroll{overflow:visible;background:none}${box} table{font-size:8.5pt}${box} th,${box} td{padding:.2em .45em}}
</style>`;
