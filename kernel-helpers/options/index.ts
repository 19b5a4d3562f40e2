export { checkCall } from "./check-call.js";
