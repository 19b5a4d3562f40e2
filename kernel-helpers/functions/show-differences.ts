import { type DifferenceSeries, type Differences, labelAt } from "../../src/record/index.js";
import { type ChangePairs, changeFigure, type Figure } from "../figures/index.js";
import { type Bundle, type Column, type Table, table } from "../tables/index.js";
import { countsSentence, findingsList, periodSentence } from "./findings-list.js";
import { shownTogether } from "./shown-together.js";

/** Pairs listed; the table says how many there are. */
const listedPairs = 12;

/** Shows differences: every pair, the change against the value it starts from, and what was found. */
export function differencesBundle(differences: Differences): Promise<Bundle> {
  const findings = findingsList(differences.observations.findings);
  return shownTogether([findings, pairsTable(differences), ...changeFigures(differences)]);
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
    digits: 12,
  });
  const season = seasonal === undefined ? "" : `, season ${seasonal}`;
  return table({
    title:
      plain && lag === 1 ? "Differences" : `Differences, order ${order}, lag ${lag}${season}, per ${per}`,
    columns: [
      ...(several ? [{ key: "group", label: "Series", kind: "text" as const }] : []),
      ...(observations.states.length > 1 ? [{ key: "state", label: "State", kind: "text" as const }] : []),
      observations.axis.counts === "numbers"
        ? { key: "index", label: "From step", kind: "integer" }
        : { key: "index", label: "From", kind: "text" },
      { key: "steps", label: "Steps", kind: "integer" },
      number("present", "Value", unit),
      number("next", "Next", unit),
      number("change", "Change", unit),
      { ...number("ratio", "Ratio"), digits: 6 },
      { ...number("perHead", "Change per value"), digits: 5 },
      ...(plain ? [] : [number("difference", "Difference", per === "step" ? unit : "")]),
    ],
    limit: listedPairs,
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
    index: pairs.axis.counts === "numbers" ? pairs.index[i] : labelAt(pairs.axis, pairs.index[i]!),
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
function changeFigures({ observations, series }: Differences): readonly Figure[] {
  const { every, of } = observations.axis.step;
  const per = every === 1 ? `per ${of}` : `per ${every} ${of}`;
  return observations.states.flatMap((state) => {
    const pairs = series.filter((one) => one.state === state.name);
    const value = { title: state.name, unit: state.unit };
    const unit = state.unit === "" ? per : `${state.unit} ${per}`;
    return [
      changeFigure({
        title: "Change against value",
        value,
        change: { title: `Change of ${state.name}`, unit },
        pairs: scatter(pairs, "change"),
        notes: ["Hollow marks are pairs over several steps, drawn at their mean change a step."],
      }),
      changeFigure({
        title: "Change per value against value",
        value,
        change: { title: "Change per value", unit: per },
        pairs: scatter(pairs, "perHead"),
      }),
    ];
  });
}

/** Pairs of one step, and apart from them those of several, at the mean of their steps. */
function scatter(series: readonly DifferenceSeries[], of: "change" | "perHead"): readonly ChangePairs[] {
  const pairs = series.flatMap((one) =>
    Array.from(one.steps, (steps, i) => ({ steps, value: one.present[i]!, change: one[of][i]! / steps })),
  );
  return [false, true]
    .map((overGap) => {
      const own = pairs.filter(({ steps, change }) => steps > 1 === overGap && Number.isFinite(change));
      const name = overGap ? "over several steps" : "recorded pairs";
      return { name, value: own.map((pair) => pair.value), change: own.map((pair) => pair.change), overGap };
    })
    .filter(({ value }) => value.length > 0);
}
