import type { Forecast, GroupForecast } from "../../src/projection/index.js";
import { type FanFigureOptions, type Figure, fanFigure, type ProjectedSeries } from "../figures/index.js";
import { type Column, type Table, table } from "../tables/index.js";
import { cautionsByGroup } from "./cautions-by-group.js";

/** A forecast as a reader sees it: fans, then the numbers ahead, then how scenarios differ. */
export function showForecast(ahead: Forecast): readonly (Figure | Table)[] {
  const contrast = contrastTable(ahead);
  return [...fanCharts(ahead), aheadTable(ahead), ...(contrast === undefined ? [] : [contrast])];
}

/** How a group and scenario are named together. */
export function projectedName({
  group,
  scenario,
}: {
  readonly group: string;
  readonly scenario: string;
}): string {
  return [group, scenario].filter((part) => part !== "").join(", ");
}

function fanCharts(ahead: Forecast): Figure[] {
  return ahead.fit.rule.states.map((state) =>
    fanFigure({ ...fanOf(ahead, state), title: `Forecast of ${ahead.fit.rule.text}` }),
  );
}

/** The fan of a state with the level that decides, and what the sentence says of it. */
export function decidingFan(
  ahead: Forecast,
  state: string,
  threshold: { readonly value: number; readonly name: string },
  event: string,
): Figure {
  return fanFigure({
    ...fanOf(ahead, state),
    title: `Forecast of ${state}, and ${threshold.name}`,
    threshold,
    event,
  });
}

function fanOf(ahead: Forecast, state: string): Omit<FanFigureOptions, "title"> {
  const { observations } = ahead.fit;
  return {
    x: { title: observations.period.column, unit: observations.period.unit },
    y: { title: state, unit: observations.states.find((each) => each.name === state)?.unit ?? "" },
    series: ahead.groups.map((group) => projected(ahead, group, state)),
    notes: notesOf(ahead),
  };
}

function projected(ahead: Forecast, group: GroupForecast, name: string): ProjectedSeries {
  const state = group.states.find((each) => each.state === name)!;
  const recorded = ahead.fit.observations.groups.find((each) => each.name === group.group)!;
  const x = group.time;
  const end = group.index.indexOf(group.recordEnd);
  const horizon = group.predictability?.predictionHorizon;
  return {
    name: projectedName(group),
    recorded: { name: "recorded", x: recorded.time, y: recorded.values[name]! },
    central: { name: "fitted path", x, y: state.central },
    bands: state.bands
      .filter((band) => band.kind === "future observation")
      .map(({ level, kind, lower, upper }) => ({ level, of: kind, x, lower, upper })),
    recordEnd: x[end]!,
    ...(horizon !== undefined && x[end + horizon] !== undefined && { predictionHorizon: x[end + horizon]! }),
  };
}

/** Column for a group, a scenario or a state, where there are several. */
const several = (key: string, label: string, names: readonly string[]): readonly Column[] =>
  new Set(names).size > 1 ? [{ key, label, kind: "text" }] : [];

function aheadTable(ahead: Forecast): Table {
  const level = Math.max(...ahead.options.levels);
  const each = periodsShown(ahead.options.periods, ahead.groups.length * ahead.fit.rule.states.length);
  const rows = ahead.groups.flatMap((group) => rowsAhead(group, level, each));
  const dated = ahead.groups.some((group) => group.labels !== undefined);
  const unit = ahead.groups[0]?.states[0]?.unit ?? "";
  const number = { kind: "number", digits: 4, unit } as const;
  const percent = `${Number((100 * level).toPrecision(12))}%`;
  return table({
    title: "Periods ahead",
    columns: [
      ...several("group", "Group", ahead.groups.map(projectedName)),
      ...several("state", "State", ahead.fit.rule.states),
      dated
        ? { key: "time", label: ahead.fit.observations.period.column, kind: "text" }
        : {
            key: "time",
            label: ahead.fit.observations.period.column,
            kind: "number",
            digits: 6,
            grouped: false,
          },
      { key: "central", label: "Fitted path", ...number },
      { key: "meanLower", label: `Mean path ${percent}, from`, ...number },
      { key: "meanUpper", label: "to", ...number },
      { key: "futureLower", label: `Future observation ${percent}, from`, ...number },
      { key: "futureUpper", label: "to", ...number },
    ],
    rows,
    limit: rows.length,
    notes: [
      ...(ahead.options.periods > each
        ? [`${each} of ${ahead.options.periods} periods ahead are shown, evenly spread.`]
        : []),
      ...notesOf(ahead),
    ],
  });
}

/** Rows shown of all groups together where a forecast is long, and the most where all of a short one is shown. */
const shownRows = 18;
const mostRows = 48;

/** How many periods ahead are shown of each series. */
function periodsShown(periods: number, series: number): number {
  if (periods <= 12 && periods * series <= mostRows) return periods;
  return Math.max(4, Math.floor(shownRows / series));
}

function rowsAhead(group: GroupForecast, level: number, each: number): Readonly<Record<string, unknown>>[] {
  const present = group.index.indexOf(group.recordEnd);
  const ahead = group.index.length - 1 - present;
  const count = Math.min(each, ahead);
  const shown = new Set(
    Array.from({ length: count }, (_, k) => present + Math.round(((k + 1) * ahead) / count)),
  );
  return group.states.flatMap((state) => {
    const band = (kind: string) => state.bands.find((each) => each.kind === kind && each.level === level)!;
    const mean = band("mean path");
    const future = band("future observation");
    return group.index.flatMap((_, t) =>
      !shown.has(t)
        ? []
        : {
            group: projectedName(group),
            state: state.state,
            time: group.labels?.[t] ?? group.time[t],
            central: state.central[t],
            meanLower: mean.lower[t],
            meanUpper: mean.upper[t],
            futureLower: future.lower[t],
            futureUpper: future.upper[t],
          },
    );
  });
}

/** Every scenario beside the first, at the end: the same draws, so that chance cancels in the difference. */
function contrastTable(ahead: Forecast): Table | undefined {
  const rows = ahead.groups.flatMap((group) => {
    const first = ahead.groups.find((each) => each.group === group.group)!;
    if (first === group) return [];
    return group.states.map((state, s) => {
      const end = group.index.length - 1;
      const difference = state.central[end]! - first.states[s]!.central[end]!;
      return { what: projectedName(group), than: first.scenario, state: state.state, difference };
    });
  });
  if (rows.length === 0) return undefined;
  const unit = ahead.groups[0]?.states[0]?.unit ?? "";
  return table({
    title: "Scenarios at the end, on the fitted path",
    columns: [
      { key: "what", label: "Scenario", kind: "text" },
      ...several("state", "State", ahead.fit.rule.states),
      { key: "difference", label: `more than under "${rows[0]!.than}"`, kind: "number", digits: 4, unit },
    ],
    rows,
    notes: ["All scenarios were run with the same drawn parameters and the same random numbers."],
  });
}

function notesOf(ahead: Forecast): string[] {
  const { paths, seed } = ahead.options;
  return [
    "Mean path: uncertainty of the parameters. Future observation: that and the error of a single value.",
    `${paths} drawn paths, seed ${seed}; quantiles by definition 7.`,
    ...cautionsByGroup(ahead.groups.map((group) => ({ ...group, group: projectedName(group) }))),
  ];
}
