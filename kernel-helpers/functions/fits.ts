import {
  type EstimateRow,
  estimates,
  type Fit,
  type FitOptions,
  fit as fitRule,
  type GroupFit,
  secondOpinion,
} from "../../src/estimate/index.js";
import type { Observations } from "../../src/record/index.js";
import type { Rule } from "../../src/rule/index.js";
import { type Figure, fittedFigure, profileFigure } from "../figures/index.js";
import { showing, superscript, type Table, table } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { cautionsByGroup } from "./cautions-by-group.js";
import { shownTogether } from "./shown-together.js";

/**
 * Estimates the parameters of a rule from a record; the result shows its estimates, its conventions and warnings,
 * and observed against fitted values.
 *
 * The engine's `fit` says what is minimised and which errors are thrown.
 *
 * @example fit(crowding, counts, { errors: "observation", distribution: "lognormal" });
 */
export function fit(rule: Rule, observations: Observations, options: FitOptions): Fit {
  const fitted = fitRule(rule, observations, options);
  caseLog.noteStep(
    `fit "${rule.text}" with errors: ${options.errors}, distribution: ${options.distribution ?? "normal"}`,
  );
  return showing({ ...fitted }, () =>
    shownTogether([estimatesTable(fitted), ...observedAndFitted(fitted), profiles(fitted)]),
  );
}

function estimatesTable(fitted: Fit): Table {
  const grouped = fitted.groups.length > 1;
  const limit = (value: number | undefined): number | string => value ?? "none";
  const rows = estimates(fitted).map((row: EstimateRow) => ({
    ...row,
    unit: superscript(row.unit),
    error: row.standardError ?? "not determined",
    lower: limit(row.profile.lower),
    upper: limit(row.profile.upper),
  }));
  const percent = `${100 * (fitted.options.level ?? 0.95)}%`;
  return table({
    title: `Estimates of ${fitted.rule.text}`,
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
      ...fitted.groups.flatMap((group) => groupNotes(fitted, group)),
      ...cautionsByGroup([{ group: "", warnings: fitted.warnings }, ...fitted.groups]),
      ...fitted.conventions,
    ],
  });
}

function groupNotes(fitted: Fit, group: GroupFit): string[] {
  const who = group.group === "" ? "" : `${group.group}: `;
  const { digits, sentence } = secondOpinion(fitted, group);
  const told =
    digits !== undefined && fitted.groups.length > 1 ? `second solver agrees to ${digits} digits` : sentence;
  const sigma = group.sigma.toPrecision(3);
  return [
    `${who}${group.count} residuals, sigma ${sigma}, AICc ${group.criteria.aicCorrected.toFixed(2)}. ${told}`,
  ];
}

function observedAndFitted(fitted: Fit): Figure[] {
  const { period, states } = fitted.observations;
  const x = { title: period.column, unit: period.unit };
  return states.map((state) =>
    fittedFigure({
      title: `Observed and fitted: ${fitted.rule.text}`,
      x,
      y: { title: state.name, unit: state.unit },
      series: fitted.groups.map((group) => {
        const points = group.points.filter((point) => point.state === state.name);
        const time = points.map((point) => point.time);
        return {
          name: group.group,
          observed: { name: "observed", x: time, y: points.map((point) => point.observed) },
          fitted: [{ name: "fitted", x: time, y: points.map((point) => point.fitted) }],
        };
      }),
    }),
  );
}

/** Whether a profile is one of a sum of squares. */
function bySquares({ options }: Fit, { estimates: all }: GroupFit): boolean {
  const counts = options.distribution === "poisson" || options.distribution === "negative-binomial";
  return !counts && all.every(({ role }) => role !== "scale");
}

/** Profiles of every parameter; of one group, because a figure of many profiles is read by nobody. */
function profiles(fitted: Fit): Figure | undefined {
  const [group] = fitted.groups;
  if (group === undefined || fitted.groups.length > 1) return undefined;
  return profileFigure({
    title: "Profiles of the parameters",
    measure: bySquares(fitted, group)
      ? "Rise of the sum of squares / sigma²"
      : "Twice the fall of the log-likelihood",
    cut: group.cut,
    level: `${100 * (fitted.options.level ?? 0.95)}%`,
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
