import type { Decision } from "../../src/record/index.js";
import { type Table, table } from "../tables/index.js";

/** The decisions log as a table: what was read, what is used, why, and who said so. */
export function decisionsTable(decisions: readonly Decision[]): Table {
  return table({
    title: "Decisions log",
    columns: [
      { key: "row", label: "Row", kind: "integer" },
      { key: "column", label: "Column", kind: "text" },
      { key: "was", label: "Was", kind: "number", digits: 15 },
      { key: "now", label: "Now", kind: "number", digits: 15 },
      { key: "why", label: "Why", kind: "text" },
      { key: "who", label: "Who", kind: "text" },
    ],
    rows: decisionRows(decisions),
    notes: decisions.length === 0 ? ["The record is used as it was read."] : [],
    format: { group: "" },
  });
}

/** The decisions log as rows, in the words in which it is shown. */
export function decisionRows(decisions: readonly Decision[]): readonly Decision[] {
  return decisions.map((decision) => ({
    ...decision,
    column: decision.column || "whole row",
    now: decision.now ?? "left out",
  }));
}

/** One decision as a line of the case's log. */
export function decisionSentence({ row, column, was, now, why, who }: Decision): string {
  const what =
    column === ""
      ? `row ${row} left out`
      : `row ${row}, ${column}: was ${was ?? "nothing"}, now ${now ?? "nothing"}`;
  return `${what}, because: ${why}${who === "" ? "" : ` (${who})`}`;
}
