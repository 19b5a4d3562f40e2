export { unknownTermError } from "./errors.js";
export { type LookUp, lookUp } from "./look-up.js";
export type { Term, TermField } from "./term.js";
export { explanationHtml, explanationText } from "./term-display.js";
export { terms } from "./terms.js";
