export { columnsOf, type RecordLike } from "./columns-of.js";
export { type FitFrames, frame, type Result, tablesOf } from "./frame.js";
export { noteFrame, notesOf, sourceOf } from "./frame-notes.js";
export { marksFound, shownTable } from "./shown-table.js";
export { toFrame } from "./to-frame.js";
