export { significant } from "./cell-text.js";
export { escapeHtml, untypeset } from "./escape-html.js";
export { look, typeface } from "./look.js";
export { type NumberFormat, numberFormat, written } from "./number-format.js";
export { oneLine } from "./plain-text.js";
export { raised } from "./raised.js";
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
