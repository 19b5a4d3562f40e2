export type { Term } from "./term.js";
export { termOf, terms } from "./terms.js";
