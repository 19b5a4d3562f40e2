export { checkCall } from "./check-call.js";
export { helpText } from "./help-text.js";
