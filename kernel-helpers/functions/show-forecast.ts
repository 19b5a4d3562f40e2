import type { Forecast, GroupForecast } from "../../src/projection/index.js";
import { ruleLabel } from "../../src/rule/index.js";
import { type FanFigureOptions, type Figure, fanFigure, type ProjectedSeries } from "../figures/index.js";
import { groupName } from "../results/index.js";
import { type Column, type Table, table } from "../tables/index.js";
import { acrossGroup, acrossRecord, periodColumn } from "./across-periods.js";
import { cautionsByGroup } from "./cautions-by-group.js";

/** A forecast as a reader sees it: fans, then the numbers ahead, then how scenarios differ. */
export function showForecast(ahead: Forecast): readonly (Figure | Table)[] {
  const contrast = contrastTable(ahead);
  return [...fanCharts(ahead), aheadTable(ahead), ...(contrast === undefined ? [] : [contrast])];
}

function fanCharts(ahead: Forecast): Figure[] {
  const { fit } = ahead;
  const title = `Forecast of ${ruleLabel(fit.rule)}`;
  return fit.rule.states.flatMap((state) => {
    const factor = ahead.groups[0]!.states.find((each) => each.state === state)?.observed?.factor;
    if (factor === undefined) return [fanFigure({ ...fanOf(ahead, state), title })];
    const index = columnOf(ahead, state);
    return [
      fanFigure({ ...fanOf(ahead, state), title: `${title}: ${state}` }),
      fanFigure({
        ...indexFanOf(ahead, state),
        title: `Forecast of ${index}, which reads ${factor} times ${state}`,
      }),
    ];
  });
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

function columnOf(ahead: Forecast, state: string): string {
  return ahead.fit.observations.states.find((each) => each.name === state)!.column;
}

/** A state in its own unit; with its record, unless that reads it through a factor. */
function fanOf(ahead: Forecast, state: string): Omit<FanFigureOptions, "title"> {
  return {
    x: acrossRecord(ahead.fit.observations),
    y: { title: state, unit: ahead.groups[0]!.states.find((each) => each.state === state)!.unit },
    series: ahead.groups.map((group) => {
      const { central, bands, observed } = group.states.find((each) => each.state === state)!;
      const kind = observed === undefined ? "future observation" : "mean path";
      const shown = bands.filter((band) => band.kind === kind);
      return series(ahead, group, state, { central, bands: shown, recorded: observed === undefined });
    }),
    notes: notesOf(ahead),
  };
}

/** What the record reads of a state through a factor: the record, and observations to come. */
function indexFanOf(ahead: Forecast, state: string): Omit<FanFigureOptions, "title"> {
  return {
    x: acrossRecord(ahead.fit.observations),
    y: {
      title: columnOf(ahead, state),
      unit: ahead.groups[0]!.states.find((each) => each.state === state)!.observed!.unit,
    },
    series: ahead.groups.map((group) => {
      const { central, bands } = group.states.find((each) => each.state === state)!.observed!;
      return series(ahead, group, state, { central, bands, recorded: true });
    }),
    notes: notesOf(ahead),
  };
}

function series(
  ahead: Forecast,
  group: GroupForecast,
  name: string,
  shown: {
    readonly central: readonly number[];
    readonly bands: GroupForecast["states"][number]["bands"];
    readonly recorded: boolean;
  },
): ProjectedSeries {
  const recorded = ahead.fit.observations.groups.find((each) => each.name === group.group)!;
  const x = group.time;
  const end = group.index.indexOf(group.recordEnd);
  const horizon = group.predictability?.predictionHorizon;
  return {
    name: groupName(group),
    x: acrossGroup(recorded),
    recorded: shown.recorded
      ? { name: "recorded", x: recorded.time, y: recorded.values[name]! }
      : { name: "recorded", x: [], y: [] },
    central: { name: "fitted path", x, y: shown.central },
    bands: shown.bands.map(({ level, kind, lower, upper }) => ({ level, of: kind, x, lower, upper })),
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
  const { axis } = ahead.fit.observations;
  const number = { kind: "number", digits: 4, unit: commonUnit(ahead, (state) => state.unit) } as const;
  const future = { ...number, unit: commonUnit(ahead, (state) => state.observed?.unit ?? state.unit) };
  const scaled = ahead.groups[0]?.states.find((state) => state.observed !== undefined);
  const observed =
    scaled === undefined ? "Future observation" : `Future observation of ${columnOf(ahead, scaled.state)}`;
  const percent = `${Number((100 * level).toPrecision(12))}%`;
  return table({
    title: "Periods ahead",
    columns: [
      ...several("group", "Group", ahead.groups.map(groupName)),
      ...several("state", "State", ahead.fit.rule.states),
      periodColumn("time", axis.column, axis),
      { key: "central", label: "Fitted path", ...number },
      { key: "meanLower", label: `Mean path ${percent}, from`, ...number },
      { key: "meanUpper", label: "to", ...number },
      { key: "futureLower", label: `${observed} ${percent}, from`, ...future },
      { key: "futureUpper", label: "to", ...future },
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

/** The unit that all states share; "" where they differ. */
function commonUnit(ahead: Forecast, unitOf: (state: GroupForecast["states"][number]) => string): string {
  const units = new Set(ahead.groups.flatMap((group) => group.states.map(unitOf)));
  return units.size === 1 ? [...units][0]! : "";
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
    const bands = [...state.bands, ...(state.observed?.bands ?? [])];
    const band = (kind: string) => bands.find((each) => each.kind === kind && each.level === level)!;
    const mean = band("mean path");
    const future = band("future observation");
    return group.index.flatMap((_, t) =>
      !shown.has(t)
        ? []
        : {
            group: groupName(group),
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
      return { what: groupName(group), than: first.scenario, state: state.state, difference };
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
    ...cautionsByGroup(ahead.groups.map((group) => ({ ...group, group: groupName(group) }))),
  ];
}
