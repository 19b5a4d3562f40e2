export { columnsOf, type RecordLike } from "./columns-of.js";
export { correctionNotes, withCorrectionColumns } from "./corrections-table.js";
export { type FitFrames, frame, type Result, tablesOf } from "./frame.js";
export { attachNotes, frameNotes, sourceOf } from "./frame-notes.js";
export { toFrame } from "./to-frame.js";
