import type { DifferenceSeries, Differences } from "../../src/record/index.js";
import { type Figure, figure, type Layer, type Panel } from "../figures/index.js";
import { type Bundle, type Column, type Table, table } from "../tables/index.js";
import { countsSentence, findingsTable, periodSentence } from "./findings-table.js";
import { shownTogether } from "./shown-together.js";

const drawn = 12;

/** Shows differences: every pair, the change against the value it starts from, and what was found. */
export function differencesBundle(differences: Differences): Promise<Bundle> {
  const findings = findingsTable(differences.observations.findings);
  return shownTogether([pairsTable(differences), changeFigure(differences), ...(findings ? [findings] : [])]);
}

function pairsTable(differences: Differences): Table {
  const { observations, series, order, lag, per, seasonal } = differences;
  const plain = order === 1 && seasonal === undefined && per === "step";
  const several = observations.groups.length > 1;
  const unit = observations.states.length === 1 ? observations.states[0]!.unit : "";
  const number = (key: string, label: string, of = ""): Column => ({
    key,
    label,
    unit: of,
    kind: "number",
    digits: 6,
  });
  const season = seasonal === undefined ? "" : `, season ${seasonal}`;
  return table({
    title:
      plain && lag === 1 ? "Differences" : `Differences, order ${order}, lag ${lag}${season}, per ${per}`,
    columns: [
      ...(several ? [{ key: "group", label: "Series", kind: "text" as const }] : []),
      ...(observations.states.length > 1 ? [{ key: "state", label: "State", kind: "text" as const }] : []),
      { key: "index", label: "From step", kind: "integer" },
      { key: "steps", label: "Steps", kind: "integer" },
      number("present", "Value", unit),
      number("next", "Next", unit),
      number("change", "Change", unit),
      number("ratio", "Ratio"),
      number("perHead", "Change per value"),
      ...(plain ? [] : [number("difference", "Difference", per === "step" ? unit : "")]),
    ],
    rows: series.flatMap((pairs) => Array.from(pairs.index.keys(), (i) => pairRow(pairs, i))),
    notes: [
      periodSentence(observations),
      countsSentence(observations),
      "A pair of more than one step holds the change over all of them; it is not spread over single steps.",
      ...differences.warnings.map(({ message }) => message),
    ],
  });
}

function pairRow(pairs: DifferenceSeries, i: number): Record<string, unknown> {
  return {
    group: pairs.group,
    state: pairs.state,
    index: pairs.index[i],
    steps: pairs.steps[i],
    present: pairs.present[i],
    next: pairs.next[i],
    change: pairs.change[i],
    ratio: pairs.ratio[i],
    perHead: pairs.perHead[i],
    difference: pairs.difference[i],
  };
}

/** The two scatters asked for before any model: change against value, and change per value against value. */
function changeFigure({ observations, series }: Differences): Figure {
  const { step } = observations.period;
  const panels = observations.states.flatMap((state): Panel[] => {
    const pairs = series.filter((one) => one.state === state.name).slice(0, drawn);
    const value = { title: state.name, unit: state.unit };
    const every = `${step.every} ${step.of}`;
    const per = state.unit === "" ? `per ${every}` : `${state.unit} per ${every}`;
    return [
      {
        title: "Change",
        x: value,
        y: { title: `Change of ${state.name}`, unit: per },
        layers: scatter(pairs, "change"),
      },
      {
        title: "Change per value",
        x: value,
        y: { title: "Change per value", unit: `per ${every}` },
        layers: scatter(pairs, "perHead"),
      },
    ];
  });
  const left =
    observations.groups.length > drawn
      ? [`The first ${drawn} of ${observations.groups.length} series are drawn.`]
      : [];
  return figure({
    title: "Change against value",
    panels,
    notes: ["Hollow marks are pairs of more than one step, drawn at their whole change.", ...left],
  });
}

function scatter(series: readonly DifferenceSeries[], of: "change" | "perHead"): Layer[] {
  const layers = series.flatMap((pairs, style) => [
    points(pairs, of, style, (steps) => steps === pairs.steps.reduce((a, b) => Math.min(a, b)), "plain"),
    points(pairs, of, style, (steps) => steps > pairs.steps.reduce((a, b) => Math.min(a, b)), "open"),
  ]);
  return [...layers.filter((layer) => layer !== undefined), { mark: "threshold", name: "no change", y: 0 }];
}

function points(
  pairs: DifferenceSeries,
  of: "change" | "perHead",
  style: number,
  takes: (steps: number) => boolean,
  look: "plain" | "open",
): Layer | undefined {
  const places = Array.from(pairs.index.keys()).filter(
    (i) => takes(pairs.steps[i]!) && Number.isFinite(pairs[of][i]!),
  );
  if (places.length === 0) return undefined;
  const own = pairs.group === "" ? "pairs" : pairs.group;
  return {
    mark: "points",
    name: look === "open" ? `${own}, several steps` : own,
    style,
    look,
    x: places.map((i) => pairs.present[i]!),
    y: places.map((i) => pairs[of][i]!),
  };
}
