import {
  type Fit as EngineFit,
  type EstimateRow,
  estimates,
  type GroupFit,
  problemOf,
  secondOpinion,
} from "../../src/estimate/index.js";
import { ruleLabel } from "../../src/rule/index.js";
import { type Figure, fittedFigure, profileFigure } from "../figures/index.js";
import { type Fit, withEstimates } from "../results/index.js";
import { showing, superscript, type Table, table } from "../tables/index.js";
import { acrossGroup, acrossRecord } from "./across-periods.js";
import { cautionsByGroup } from "./cautions-by-group.js";
import { ruleNotes } from "./rule-title.js";
import { presentObservations } from "./show-observations.js";
import { presentRule } from "./show-rule.js";
import { shownTogether } from "./shown-together.js";

/** Makes a fit ready for a reader: its estimates by name, its display, and nothing left to change in it. */
export function presentFit(fit: EngineFit): Fit {
  presentRule(fit.rule);
  presentObservations(fit.observations);
  return showing(withEstimates(fit), () =>
    shownTogether([estimatesTable(fit), ...observedAndFitted(fit), profiles(fit)]),
  );
}

/** Makes the fit that a result holds ready for a reader. */
export function presentFitIn<T extends { readonly fit: EngineFit }>(result: T): T & { readonly fit: Fit } {
  return Object.assign(result, { fit: presentFit(result.fit) });
}

function estimatesTable(fitted: EngineFit): Table {
  const grouped = fitted.groups.length > 1;
  const limit = (value: number | undefined): number | string => value ?? "none";
  const rows = estimates(fitted).map((row: EstimateRow) => ({
    ...row,
    unit: superscript(row.unit),
    error: row.standardError ?? "not determined",
    lower: limit(row.profile.lower),
    upper: limit(row.profile.upper),
  }));
  const percent = `${100 * problemOf(fitted).level}%`;
  return table({
    title: `Estimates of ${ruleLabel(fitted.rule)}`,
    columns: [
      ...(grouped ? [{ key: "group", label: "Group", kind: "text" } as const] : []),
      { key: "name", label: "Parameter", kind: "text" },
      ...(rows.some((row) => row.unit !== "") ? [{ key: "unit", label: "Unit", kind: "text" } as const] : []),
      { key: "value", label: "Estimate", kind: "estimate", pairedWith: "standardError" },
      { key: "error", label: "Standard error", kind: "estimate" },
      {
        key: "lower",
        label: `Profile interval ${percent}, from`,
        kind: "estimate",
        pairedWith: "standardError",
      },
      { key: "upper", label: "to", kind: "estimate", pairedWith: "standardError" },
    ],
    rows,
    notes: [
      ...ruleNotes([fitted.rule]),
      ...fitted.groups.flatMap((group) => groupNotes(fitted, group)),
      ...cautionsByGroup([{ group: "", warnings: fitted.warnings }, ...fitted.groups]),
      ...fitted.conventions,
    ],
  });
}

function groupNotes(fitted: EngineFit, group: GroupFit): string[] {
  const who = group.group === "" ? "" : `${group.group}: `;
  const opinion = fitted.groups.length === 1 ? secondOpinion(fitted, group) : undefined;
  const criteria = group.criteria === undefined ? "" : `, AICc ${group.criteria.aicCorrected.toFixed(2)}`;
  const sigma = group.sigma.toPrecision(3);
  return [
    `${who}${group.count} residuals, sigma ${sigma}${criteria}.${opinion ? ` ${opinion.sentence}` : ""}`,
  ];
}

function observedAndFitted(fitted: EngineFit): Figure[] {
  const { states } = fitted.observations;
  return states.map((state) =>
    fittedFigure({
      title: `Observed and fitted: ${ruleLabel(fitted.rule)}`,
      x: acrossRecord(fitted.observations),
      y: { title: state.name, unit: state.unit },
      series: fitted.groups.map((group) => {
        const points = group.points.filter((point) => point.state === state.name);
        const time = points.map((point) => point.time);
        const recorded = fitted.observations.groups.find(({ name }) => name === group.group)!;
        return {
          name: group.group,
          x: acrossGroup(recorded),
          observed: { name: "observed", x: time, y: points.map((point) => point.observed) },
          fitted: [{ name: "fitted", x: time, y: points.map((point) => point.fitted) }],
        };
      }),
    }),
  );
}

/** Profiles of every parameter; of one group, because a figure of many profiles is read by nobody. */
function profiles(fitted: EngineFit): Figure | undefined {
  const [group] = fitted.groups;
  if (group === undefined || fitted.groups.length > 1) return undefined;
  return profileFigure({
    title: "Profiles of the parameters",
    measure:
      problemOf(fitted).group(group.group).kind === "least-squares"
        ? "Rise of the sum of squares / sigma²"
        : "Twice the fall of the log-likelihood",
    cut: group.cut,
    level: `${100 * problemOf(fitted).level}%`,
    profiles: group.estimates.map(({ name, unit, value, profile, trace }) => ({
      parameter: name,
      unit,
      values: trace.map((place) => place.value),
      increase: trace.map((place) => place.increase),
      estimate: value,
      lower: profile.lower,
      upper: profile.upper,
    })),
  });
}
