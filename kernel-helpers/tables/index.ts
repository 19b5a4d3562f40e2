export {
  escapeHtml,
  type NumberFormat,
  numberFormat,
  superscript,
  untypeset,
} from "../wording/index.js";
export { oneLine } from "./plain-text.js";
export { type Bundle, bundleOf, showing } from "./show-itself.js";
export { tabSeparated } from "./tab-separated.js";
export {
  type Column,
  type ColumnKind,
  type Footnote,
  type Table,
  type TableOptions,
  table,
} from "./table.js";
export { tableHtml } from "./table-html.js";
export { tableText } from "./table-text.js";
export { theme, typeface } from "./theme.js";
