import type { Finding, Observations } from "../../src/record/index.js";
import { oneLine, showing, table, tableHtml } from "../tables/index.js";

const listed = 24;

/** What was found in a record: a table in a page, whole sentences in a text; undefined when nothing was. */
export function findingsList(findings: readonly Finding[]): object | undefined {
  if (findings.length === 0) return undefined;
  const made = table({
    title: "Findings",
    columns: [
      { key: "row", label: "Row", kind: "integer" },
      { key: "message", label: "What was found", kind: "text" },
      { key: "done", label: "What was done", kind: "text" },
    ],
    rows: findings.map(({ row, message, done }) => ({ row: row ?? "all", message, done })),
    limit: listed,
    format: { group: "" },
  });
  const text = [
    "Findings",
    "",
    ...findings.slice(0, listed).map(({ message, done }) => oneLine(`${message} Done: ${done}.`)),
  ];
  if (findings.length > listed) text.push(`${findings.length - listed} more findings are not listed.`);
  return showing({ kind: "findings" }, () => ({
    "text/html": tableHtml(made),
    "text/plain": text.join("\n"),
  }));
}

/** "25 rows read, 24 used, 2 flagged, 0 corrected, 1 settled by an option, 1 refused." */
export function countsSentence({ counts }: Observations): string {
  const { aside = 0, read, used, flagged, corrected, settled = 0, refused } = counts;
  const others = aside > 0 ? `${aside} rows not chosen; ` : "";
  const byOption = settled > 0 ? ` ${settled} settled by an option,` : "";
  return `${others}${read} rows read, ${used} used, ${flagged} flagged, ${corrected - settled} corrected,${byOption} ${refused} refused.`;
}

/** "each value is a level", or what each column is where they differ. */
function measuredWords({ states, flows = [] }: Observations): string {
  const [first] = states;
  if (flows.length === 0 && states.every(({ measured }) => measured === first!.measured))
    return `each value is a ${first!.measured}`;
  const told = [
    ...states.map(({ name, measured }) => `${name} is a ${measured}`),
    ...flows.map((name) => `${name} is a flow`),
  ];
  return told.join(", ");
}

/** Period, step, whether levels or flows, and the order of events, in one line. */
export function periodSentence(observations: Observations): string {
  const { column, step, calendar } = observations.axis;
  const counted = calendar ?? (step.every === 1 ? `1 ${step.of}` : `${step.every} ${step.of}s`);
  const order = observations.order === "" ? "not stated" : observations.order;
  return `Period "${column}", one step is ${counted}; ${measuredWords(observations)}; order of events: ${order}.`;
}
