export { type Progress, progress } from "./progress.js";
export { withProgress } from "./with-progress.js";
