import {
  type ChangePointOptions,
  type DensityDependence,
  type DensityOptions,
  type ChangePoint as EngineChangePoint,
  changePoint as findChangePoint,
  densityDependence as testDensity,
} from "../../src/evidence/index.js";
import type { Observations } from "../../src/record/index.js";
import { type Rule, ruleLabel } from "../../src/rule/index.js";
import { type Figure, figure, type Panel } from "../figures/index.js";
import { checkCall } from "../options/index.js";
import type { ChangePoint } from "../results/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { acrossGroup, periodColumn } from "./across-periods.js";
import { caseLog } from "./case-log.js";
import { cautionsByGroup } from "./cautions-by-group.js";
import { seededRun } from "./seeded-run.js";
import { presentFitIn } from "./show-fit.js";
import { shownTogether } from "./shown-together.js";

/**
 * Looks for a date from which the parameters of a rule take other values; the result shows the date with its interval,
 * both sets of parameters, and how much each date would explain.
 *
 * The seed is the case's unless one is given.
 *
 * @example changePoint(crowding, counts, { distribution: "lognormal" }).groups[0].found; // false
 */
export function changePoint(
  rule: Rule,
  observations: Observations,
  options: ChangePointOptions = {},
): ChangePoint {
  checkCall("changePoint", arguments);
  const looked = seededRun("Records without a break", options, (own) =>
    findChangePoint(rule, observations, own),
  );
  caseLog.noteStep(`looked for a break in "${ruleLabel(rule)}": ${looked.sentence}`);
  return showing(presentFitIn(looked), () => shownTogether([breaksTable(looked), breaksFigure(looked)]));
}

/**
 * Tests whether growth a period falls with the level, against records that grow by chance alone.
 *
 * The seed is the case's unless one is given.
 *
 * @example densityDependence(counts).groups[0].found; // true
 */
export function densityDependence(
  observations: Observations,
  options: DensityOptions = {},
): DensityDependence {
  checkCall("densityDependence", arguments);
  const tested = seededRun("Records drawn", options, (own) => testDensity(observations, own));
  caseLog.noteStep(`tested density dependence: ${tested.sentence}`);
  return showing(tested, () => shownTogether([densityTable(tested)]));
}

function breaksTable(looked: EngineChangePoint): Table {
  const { axis } = looked.fit.observations;
  const percent = Math.round(100 * looked.level);
  return table({
    title: `One change in the parameters of ${ruleLabel(looked.fit.rule)}`,
    columns: [
      ...(looked.groups.length > 1 ? [{ key: "group", label: "Group", kind: "text" } as const] : []),
      periodColumn("date", "Likeliest date", axis),
      periodColumn("earliest", `${percent}% interval, from`, axis),
      periodColumn("latest", "to", axis),
      { key: "statistic", label: "Largest F", kind: "number", digits: 3 },
      { key: "probability", label: "By chance", kind: "probability", pairedWith: "probabilityError" },
      { key: "name", label: "Parameter", kind: "text" },
      { key: "before", label: "Before", kind: "number", digits: 4 },
      { key: "after", label: "After", kind: "number", digits: 4 },
    ],
    rows: looked.groups.flatMap((group) =>
      Object.keys(group.before.parameters).map((name) => ({
        ...group,
        ...(axis.counts !== "numbers" && group.labels),
        name,
        before: group.before.parameters[name],
        after: group.after.parameters[name],
      })),
    ),
    notes: [
      looked.sentence,
      ...cautionsByGroup([{ group: "", warnings: looked.fit.warnings }]),
      `Held against the largest F of ${looked.resamples} records drawn without a break; an F table would call a break far too often.`,
    ],
  });
}

function breaksFigure(looked: EngineChangePoint): Figure {
  const { observations, rule } = looked.fit;
  const panels = looked.groups.flatMap((group): Panel[] => {
    const recorded = observations.groups.find((each) => each.name === group.group)!;
    const [state] = observations.states;
    const x = acrossGroup(recorded);
    const marks = [
      { mark: "vertical", name: "likeliest date", x: group.date } as const,
      { mark: "vertical", name: "earliest", x: group.earliest, inLegend: false } as const,
      { mark: "vertical", name: "latest", x: group.latest, inLegend: false } as const,
    ];
    return [
      {
        title: group.group === "" ? "Record" : group.group,
        x,
        y: { title: state!.column, unit: state!.unit },
        layers: [
          { mark: "points", name: "recorded", x: recorded.time, y: recorded.values[state!.name]! },
          ...marks,
        ],
      },
      {
        title: "What a break at each date would explain",
        x,
        y: { title: "F" },
        layers: [
          {
            mark: "line",
            name: "F",
            x: group.trace.map(({ date }) => date),
            y: group.trace.map(({ statistic }) => statistic),
          },
        ],
      },
    ];
  });
  return figure({
    title: `When the parameters of ${ruleLabel(rule)} may have changed`,
    panels,
    summary: looked.sentence,
  });
}

function densityTable(tested: DensityDependence): Table {
  return table({
    title: "Does growth fall with the level?",
    columns: [
      ...(tested.groups.length > 1 ? [{ key: "group", label: "Group", kind: "text" } as const] : []),
      { key: "steps", label: "Steps", kind: "integer" },
      { key: "slope", label: "Slope of ln(next/present) on level", kind: "number", digits: 3 },
      { key: "statistic", label: "In standard errors", kind: "number", digits: 3 },
      { key: "probability", label: "As steep by chance", kind: "probability" },
      { key: "answer", label: "Answer", kind: "text" },
    ],
    rows: tested.groups.map((group) => ({ ...group, answer: group.found ? "yes" : "not shown" })),
    notes: [
      tested.sentence,
      `Held against ${tested.resamples} records that grow by chance alone: the slope leans below zero even there.`,
    ],
  });
}
