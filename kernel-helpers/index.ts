export { ModelError } from "../src/numeric/index.js";
