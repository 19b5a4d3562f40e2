export { checkCall } from "./check-call.js";
export { whichGroupError } from "./errors.js";
