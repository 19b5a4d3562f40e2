import type { Observations, ObservedGroup, ObservedState } from "../../src/record/index.js";
import { type Figure, type FlaggedValue, recordFigure } from "../figures/index.js";
import { type Observations as ShownObservations, withLast } from "../results/index.js";
import { type Bundle, showing, type Table, table } from "../tables/index.js";
import { acrossRecord, periodCell, periodColumn } from "./across-periods.js";
import { decisionsTable } from "./decisions-table.js";
import { countsSentence, findingsList, periodSentence } from "./findings-list.js";
import { shownTogether } from "./shown-together.js";

/** Series drawn; with more the figure says how many are left out. */
const drawn = 12;

/** Makes a record ready for a reader: its last values, its display, and nothing left to change in it. */
export function presentObservations(observations: Observations): ShownObservations {
  return showing(withLast(observations), () => observationsBundle(observations));
}

/** Shows a record: one line a series, the raw values with flagged rows marked, and what was found. */
function observationsBundle(observations: Observations): Promise<Bundle> {
  const findings = findingsList(observations.findings);
  const { decisions = [] } = observations;
  const decided = decisions.length > 0 ? decisionsTable(decisions) : undefined;
  return shownTogether([seriesTable(observations), findings, decided, ...recordFigures(observations)]);
}

function seriesTable(observations: Observations): Table {
  const named = observations.groups.length > 1;
  const states = observations.states.map((state, i) => ({ state, i }));
  return table({
    title: "Observations",
    columns: [
      ...(named ? [{ key: "name", label: "Series", kind: "text" as const }] : []),
      { key: "count", label: "Values", kind: "integer" },
      periodColumn("from", "From", observations.axis),
      periodColumn("to", "To", observations.axis),
      { key: "gaps", label: "Multi-step pairs", kind: "integer" },
      ...states.flatMap(({ state, i }) =>
        ["first", "least", "most", "final"].map((word) => ({
          key: `${word}${i}`,
          label: `${state.name}, ${word}`,
          unit: state.unit,
          kind: "number" as const,
          digits: 12,
        })),
      ),
    ],
    rows: observations.groups.map((group) => seriesRow(group, observations.states)),
    notes: [periodSentence(observations), countsSentence(observations)],
  });
}

function seriesRow(group: ObservedGroup, states: readonly ObservedState[]): Record<string, unknown> {
  const { axis, index, time } = group;
  const row: Record<string, unknown> = {
    name: group.name,
    count: index.length,
    from: periodCell(axis, time[0]!, time[0]!),
    to: periodCell(axis, time[0]!, time[time.length - 1]!),
    gaps: index.filter((at, i) => i > 0 && at - index[i - 1]! > 1).length,
  };
  states.forEach(({ name }, i) => {
    const values = group.values[name]!;
    row[`first${i}`] = values[0];
    row[`least${i}`] = values.reduce((a, b) => Math.min(a, b));
    row[`most${i}`] = values.reduce((a, b) => Math.max(a, b));
    row[`final${i}`] = values[values.length - 1];
  });
  return row;
}

/** One figure a state: series side by side, rows that a finding names ringed. */
function recordFigures(observations: Observations): readonly Figure[] {
  const { groups, states, findings } = observations;
  const why = new Map(findings.map(({ row, kind }) => [row, kind]));
  const shown = groups.slice(0, drawn);
  const notes = groups.length > drawn ? [`The first ${drawn} of ${groups.length} series are drawn.`] : [];
  return states.map((state) =>
    recordFigure({
      title: "Record as read",
      x: acrossRecord(observations),
      y: { title: state.name, unit: state.unit },
      series: shown.map((group) => ({
        name: group.name === "" ? state.name : group.name,
        x: group.time,
        y: group.values[state.name]!,
      })),
      flagged: shown.flatMap((group) => flaggedOf(group, state, why)),
      notes,
    }),
  );
}

function flaggedOf(
  group: ObservedGroup,
  { name }: ObservedState,
  why: ReadonlyMap<number | undefined, string>,
): readonly FlaggedValue[] {
  return Array.from(group.rows.keys()).flatMap((i) => {
    const kind = why.get(group.rows[i]);
    if (kind === undefined) return [];
    return [{ x: group.time[i]!, y: group.values[name]![i]!, why: kind.replaceAll("-", " ") }];
  });
}
