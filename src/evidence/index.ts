export { type Comparison, type ComparisonRow, compare } from "./compare.js";
