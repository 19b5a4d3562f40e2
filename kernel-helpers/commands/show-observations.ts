import type { Observations, ObservedGroup, ObservedState } from "../../src/record/index.js";
import { type Figure, figure, type Layer, type Panel } from "../figures/index.js";
import { type Bundle, type Table, table } from "../tables/index.js";
import { countsSentence, findingsTable, periodSentence } from "./findings-table.js";
import { shownTogether } from "./shown-together.js";

/** Series drawn by name; with more the figure says how many are left out. */
const drawn = 12;

/** Shows a record: one line a series, the raw values with flagged rows marked, and what was found. */
export function observationsBundle(observations: Observations): Promise<Bundle> {
  const findings = findingsTable(observations.findings);
  return shownTogether([
    seriesTable(observations),
    recordFigure(observations),
    ...(findings ? [findings] : []),
  ]);
}

function seriesTable(observations: Observations): Table {
  const named = observations.groups.length > 1;
  const states = observations.states.map((state, i) => ({ state, i }));
  return table({
    title: "Observations",
    columns: [
      ...(named ? [{ key: "name", label: "Series", kind: "text" as const }] : []),
      { key: "count", label: "Values", kind: "integer" },
      { key: "last", label: "Last step", kind: "integer" },
      { key: "gaps", label: "Multi-step pairs", kind: "integer" },
      ...states.flatMap(({ state, i }) =>
        ["first", "least", "most", "final"].map((word) => ({
          key: `${word}${i}`,
          label: `${state.name}, ${word}`,
          unit: state.unit,
          kind: "number" as const,
          digits: 6,
        })),
      ),
    ],
    rows: observations.groups.map((group) => seriesRow(group, observations.states)),
    notes: [periodSentence(observations), countsSentence(observations)],
  });
}

function seriesRow(group: ObservedGroup, states: readonly ObservedState[]): Record<string, unknown> {
  const { index } = group;
  const row: Record<string, unknown> = {
    name: group.name,
    count: index.length,
    last: index[index.length - 1],
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

function recordFigure(observations: Observations): Figure {
  const { groups, states, period } = observations;
  const flagged = new Set(observations.findings.flatMap(({ row }) => (row === undefined ? [] : [row])));
  const shown = groups.slice(0, drawn);
  const panels = states.map((state): Panel => {
    const layers = shown.map(
      (group): Layer => ({
        mark: "points",
        name: group.name === "" ? state.name : group.name,
        x: group.time,
        y: group.values[state.name]!,
      }),
    );
    return {
      title: states.length > 1 ? state.name : "",
      x: { title: period.column, unit: period.unit },
      y: { title: state.name, unit: state.unit },
      layers: [...layers, ...flags(shown, state, flagged)],
    };
  });
  const notes = groups.length > drawn ? [`The first ${drawn} of ${groups.length} series are drawn.`] : [];
  return figure({ title: "Record as read", panels, notes });
}

function flags(
  groups: readonly ObservedGroup[],
  state: ObservedState,
  flagged: ReadonlySet<number>,
): Layer[] {
  const places = groups.flatMap((group) =>
    Array.from(group.rows.keys())
      .filter((i) => flagged.has(group.rows[i]!))
      .map((i) => ({ x: group.time[i]!, y: group.values[state.name]![i]! })),
  );
  if (places.length === 0) return [];
  return [
    {
      mark: "points",
      name: "flagged",
      look: "flag",
      x: places.map(({ x }) => x),
      y: places.map(({ y }) => y),
    },
  ];
}
