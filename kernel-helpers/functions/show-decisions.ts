import {
  type GroupReach,
  type NextReading,
  reachedLevel,
  type Solved,
  type TimeToReach,
} from "../../src/decision/index.js";
import { type Forecast, levelSide, type Simulation } from "../../src/projection/index.js";
import type { PeriodAxis } from "../../src/record/index.js";
import { type Figure, figure } from "../figures/index.js";
import { groupName } from "../results/index.js";
import { type Column, type Table, table } from "../tables/index.js";
import { acrossPeriods, acrossRecord, periodCell, periodColumn } from "./across-periods.js";
import { ruleTitle } from "./rule-title.js";
import { decidingFan } from "./show-forecast.js";

const percent = (level: number): string => `${Number((100 * level).toPrecision(12))}%`;

/** What is to be said of the time of a reading. */
function remarkOf({ tooLate, withinRecord }: NextReading["choices"][number]): string {
  if (tooLate) return "after the event: too late";
  return withinRecord ? "within the record: kept samples only" : "ahead";
}

/** The answer to "when": a table of groups, and the distribution over periods where chance has a part. */
export function showReach(found: TimeToReach, ahead: Forecast | Simulation): readonly (Table | Figure)[] {
  const figures = found.groups.some((group) => group.distribution.length > 1)
    ? [reachFigure(found, ahead)]
    : [];
  const name = `the level ${amountWords(found)}`;
  const fans =
    ahead.kind === "forecast" && ahead.fit.rule.states.includes(found.state)
      ? [decidingFan(ahead, found.state, { value: found.groups[0]!.levelAt, name }, eventWords(found))]
      : [];
  return [reachTable(found, ahead.groups[0]!.axis), ...fans, ...figures];
}

function reachTable(found: TimeToReach, axis: PeriodAxis): Table {
  const dated = axis.counts !== "numbers";
  const time = dated
    ? ({ kind: "text" } as const)
    : ({ kind: "number", digits: 5, unit: found.periodUnit, grouped: false } as const);
  const random = found.groups.some((group) => group.paths > 1);
  const grouped: Column[] = found.groups.length > 1 ? [{ key: "who", label: "Group", kind: "text" }] : [];
  return table({
    title: `When ${found.state} reaches ${amountWords(found)}${ruleTitle(found.rule, "by the rule")}`,
    columns: [
      ...grouped,
      { key: "time", label: "Without random change", ...time },
      ...(random ? interval(time) : []),
      { key: "firstPeriod", label: "First period", ...time },
      ...(random ? never : []),
    ],
    rows: found.groups.map((group) => ({
      ...group,
      who: groupName(group),
      ...timesOf(group, dated),
    })),
    notes: [
      ...(random ? [`The interval carries the uncertainty of the ${found.margin}.`] : []),
      found.sentence,
    ],
  });

  function interval(of: typeof time): Column[] {
    return [
      { key: "lower", label: `Interval ${percent(found.level)}, from`, ...of },
      { key: "upper", label: "to", ...of },
    ];
  }
}

/** "A: there by hour 372 in 99.0% of paths (Monte-Carlo error 0.2%)". */
function eventWords(found: TimeToReach): string {
  const each = found.groups.map((group) => {
    const name = groupName(group);
    const share = `${(100 * (1 - group.never)).toFixed(1)}% of paths (Monte-Carlo error ${(100 * group.neverError).toFixed(1)}%)`;
    return `${name === "" ? "" : `${name}: `}there by ${group.words.lastPeriod} in ${share}`;
  });
  const [first = "", ...rest] = each;
  return [first.charAt(0).toUpperCase() + first.slice(1), ...rest].join("; ");
}

const never: readonly Column[] = [
  { key: "never", label: "Share of paths never there", kind: "probability", pairedWith: "neverError" },
  { key: "neverError", label: "Monte-Carlo error", kind: "number", digits: 1 },
];

function timesOf(group: GroupReach, dated: boolean): Readonly<Record<string, number | string>> {
  const missing = group.beginsPast ? "past it from the start" : "not reached";
  const { words } = group;
  return {
    time: (dated ? words.time : group.time) ?? missing,
    firstPeriod: (dated ? words.firstPeriod : group.firstPeriod) ?? missing,
    lower: (dated ? words.lower : group.lower) ?? "none",
    upper: (dated ? words.upper : group.upper) ?? "none",
  };
}

/** "120 ×10⁴ cells/mL", as the sentence has it. */
function amountWords(found: TimeToReach): string {
  return reachedLevel(found, found.groups[0]!);
}

/** "falls to 0 EUR". */
export function levelWords(found: TimeToReach): string {
  return `${levelSide(found).sign < 0 ? "falls" : "rises"} to ${amountWords(found)}`;
}

function reachFigure(found: TimeToReach, ahead: Forecast | Simulation): Figure {
  const [first] = ahead.groups;
  const across =
    ahead.kind === "forecast"
      ? acrossRecord(ahead.fit.observations)
      : acrossPeriods(ahead.axis, first!.time[0]! - first!.index[0]! * ahead.axis.step.every);
  return figure({
    title: `By when ${found.state} is at or past ${amountWords(found)}`,
    x: { ...across, title: "First period" },
    y: { title: "Share of paths there by then", ends: [0, 1] },
    layers: found.groups.map((group) => ({
      mark: "line",
      name: groupName(group) || "paths",
      x: group.distribution.map((row) => row.time),
      y: group.distribution.map((row) => row.by),
      stepped: true,
    })),
  });
}

/** The answer to "what setting": one row a solution. */
export function showSolved(found: Solved): readonly Table[] {
  const setting = { kind: "number", digits: 8, unit: found.unit } as const;
  const without = found.simulated ? "simulated" : "exact";
  return [
    table({
      title: `What ${found.vary} must be`,
      columns: [
        { key: "value", label: found.vary, ...setting },
        { key: "lower", label: `Interval ${percent(found.level)}, from`, ...setting, digits: 4 },
        { key: "upper", label: "to", ...setting, digits: 4 },
        { key: "meets", label: "Met by", kind: "text" },
        { key: "achieved", label: found.measure, kind: "number", digits: 5, unit: found.measureUnit },
        { key: "achievedError", label: "Monte-Carlo error", kind: "number", digits: 1 },
      ],
      rows: [...found.solutions, ...sidesOf(found)].map((solution) => ({
        ...solution,
        lower: solution.margin === undefined ? without : (solution.margin.lower ?? "none"),
        upper: solution.margin === undefined ? without : (solution.margin.upper ?? "none"),
      })),
      notes: [found.sentence],
    }),
  ];
}

/** The two sides of every jump over the target, as rows beside the solutions. */
function sidesOf(
  found: Solved,
): readonly Pick<Solved["solutions"][number], "value" | "achieved" | "achievedError" | "margin">[] {
  return found.jumps.flatMap(({ below, above }) =>
    [below, above].map((side) => ({
      ...side,
      achievedError: 0,
      margin: undefined,
      meets: "neither side: the measure jumps",
    })),
  );
}

/** The answer to "which reading": gain against time, and the best few. */
export function showNextReading(found: NextReading): readonly (Figure | Table)[] {
  const narrowing = found.purpose === "narrow the answer";
  const gain = narrowing ? "Margin expected to narrow by" : "Expected evidence (2 ln likelihood)";
  const x = found.choices.map((choice) => choice.time);
  const y = found.choices.map((choice) => choice.gain);
  return [
    figure({
      title: `What a further reading of ${found.state} would bring`,
      x: { ...acrossPeriods(found.axis, found.zero), title: "Time of the reading" },
      y: { title: gain },
      layers: [
        {
          mark: "points",
          name: "expected gain, with 2 Monte-Carlo errors",
          x,
          y,
          lower: found.choices.map((choice) => choice.gain - 2 * choice.error),
          upper: found.choices.map((choice) => choice.gain + 2 * choice.error),
        },
        { mark: "vertical", name: "best", x: found.recommended.time },
        ...(found.event === undefined || !Number.isFinite(found.event)
          ? []
          : [{ mark: "vertical", name: "the event", x: found.event, style: 5 } as const]),
      ],
      notes: [found.sentence],
    }),
    table({
      title: "The five times that are worth most",
      columns: [
        periodColumn("time", "Time", found.axis),
        narrowing
          ? { key: "gain", label: gain, kind: "percent", digits: 1 }
          : { key: "gain", label: gain, kind: "number", digits: 3 },
        { key: "error", label: "Monte-Carlo error", kind: "number", digits: 1 },
        { key: "cost", label: "Cost", kind: "number", digits: 3 },
        { key: "remark", label: "Remark", kind: "text" },
      ],
      rows: [...found.choices]
        .sort((a, b) => b.worth - a.worth)
        .slice(0, 5)
        .map((choice) => ({
          ...choice,
          time: periodCell(found.axis, found.zero, choice.time),
          remark: remarkOf(choice),
        })),
      notes: [found.sentence],
    }),
  ];
}
