import type { GroupForecast, Simulation } from "../../src/projection/index.js";
import { ruleLabel } from "../../src/rule/index.js";
import { type Figure, figure, type Layer } from "../figures/index.js";
import { type Column, type Table, table } from "../tables/index.js";
import { acrossPeriods, periodColumn } from "./across-periods.js";
import { cautionsByGroup } from "./cautions-by-group.js";
import { ruleTitle } from "./rule-title.js";

/** A simulation as a reader sees it: its paths by scenario, and the numbers at their periods. */
export function showSimulation(run: Simulation): readonly (Figure | Table)[] {
  return [...figuresOf(run), tableOf(run)];
}

const percent = (level: number): string => `${Number((100 * level).toPrecision(12))}%`;

function figuresOf(run: Simulation): Figure[] {
  return run.rule.states.map((name, s) =>
    figure({
      title: `Simulation${ruleTitle(ruleLabel(run.rule), "of")}: ${name}`,
      panels: run.groups.map((group) => ({
        title: group.scenario,
        x: acrossPeriods(run.axis, group.time[0]! - group.index[0]! * run.axis.step.every),
        y: { title: name, unit: group.states[s]!.unit },
        layers: layersOf(run, group, s),
      })),
      notes: notesOf(run),
    }),
  );
}

function layersOf(run: Simulation, group: GroupForecast, place: number): Layer[] {
  const state = group.states[place]!;
  const bands = run.options.paths === 1 ? [] : [...state.bands].sort((a, b) => b.level - a.level);
  return [
    ...bands.map(({ level, lower, upper }, nested): Layer => {
      const name = `${percent(level)} of simulated paths`;
      return { mark: "band", name, x: group.time, lower, upper, nested, style: 0 };
    }),
    { mark: "line", name: "without random change", x: group.time, y: state.central, style: 0 },
  ];
}

function tableOf(run: Simulation): Table {
  const level = Math.max(...run.options.levels);
  const random = run.options.paths > 1;
  const unit = run.groups[0]?.states[0]?.unit ?? "";
  const number = { kind: "number", digits: 6, unit } as const;
  const columns: Column[] = [
    ...(run.groups.length > 1 ? [{ key: "scenario", label: "Scenario", kind: "text" } as const] : []),
    ...(run.rule.states.length > 1 ? [{ key: "state", label: "State", kind: "text" } as const] : []),
    { ...periodColumn("period", run.options.period, run.axis), unit: "" },
    { key: "central", label: "Without random change", ...number },
  ];
  if (random)
    columns.push(
      { key: "median", label: "Half of paths below", ...number },
      { key: "lower", label: `${percent(level)} of paths, from`, ...number },
      { key: "upper", label: "to", ...number },
    );
  return table({
    title: "Simulated periods",
    columns,
    rows: rowsOf(run, level),
    limit: 60,
    notes: ["Some of the periods, evenly spread; the result holds all of them.", ...notesOf(run)],
  });
}

/** Rows shown of all scenarios and states together. */
const shownRows = 24;

/** Some periods of every scenario and state, evenly spread from the first to the last. */
function rowsOf(run: Simulation, level: number): Readonly<Record<string, unknown>>[] {
  const each = Math.max(5, Math.floor(shownRows / (run.groups.length * run.rule.states.length)));
  const last = run.options.periods;
  const count = Math.min(each, last + 1);
  const shown = Array.from({ length: count }, (_, k) => Math.round((k * last) / Math.max(1, count - 1)));
  return run.groups.flatMap((group) =>
    group.states.flatMap((state) => {
      const band = state.bands.find((each) => each.level === level);
      return shown.map((t) => ({
        scenario: group.scenario,
        state: state.state,
        period: group.labels?.[t] ?? group.time[t],
        central: state.central[t],
        median: state.median[t],
        lower: band?.lower[t],
        upper: band?.upper[t],
      }));
    }),
  );
}

function notesOf(run: Simulation): string[] {
  const { paths, seed } = run.options;
  const parameters = Object.entries(run.parameters).map(([name, value]) => `${name} = ${value}`);
  return [
    ...(parameters.length > 0 ? [`At ${parameters.join(", ")}.`] : []),
    ...(paths > 1 ? [`${paths} simulated paths, seed ${seed}; quantiles by definition 7.`] : []),
    ...cautionsByGroup(run.groups.map((group) => ({ ...group, group: group.scenario }))),
  ];
}
