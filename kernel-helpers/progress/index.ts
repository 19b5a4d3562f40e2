export { type Progress, progress } from "./progress.js";
export { runShown } from "./run-shown.js";
export { withProgress } from "./with-progress.js";
