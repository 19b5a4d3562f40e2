import {
  type Bootstrap,
  type BootstrapOptions,
  bootstrap as bootstrapFit,
  type UpdatedFit as EngineUpdatedFit,
  updateFit as extendFit,
  type Fit,
  type GridIntervalOptions,
  gridInterval as gridIntervalOf,
  type Interval,
} from "../../src/estimate/index.js";
import type { Observations } from "../../src/record/index.js";
import { ruleLabel } from "../../src/rule/index.js";
import { checkCall } from "../options/index.js";
import type { UpdatedFit } from "../results/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { seededRun } from "./seeded-run.js";
import { presentFitIn } from "./show-fit.js";
import { shownTogether } from "./shown-together.js";

/**
 * Refits a fit to records simulated from it; the result shows bias, standard error and interval of every parameter.
 *
 * The seed is the case's unless one is given; a long run shows its progress and can be interrupted.
 *
 * @example bootstrap(fit(crowding, counts, { errors: "observation" }), { resamples: 99 }).used; // 99
 */
export function bootstrap(fit: Fit, options: BootstrapOptions = {}): Bootstrap {
  checkCall("bootstrap", arguments);
  const drawn = seededRun("Refits", options, (own) => bootstrapFit(fit, own));
  caseLog.noteStep(`bootstrap of "${ruleLabel(fit.rule)}" by ${drawn.errors} errors, ${drawn.used} refits`);
  return showing(drawn, () => shownTogether([bootstrapTable(fit, drawn)]));
}

function bootstrapTable(fit: Fit, drawn: Bootstrap): Table {
  const percent = `${100 * (drawn.rows[0]?.interval.level ?? 0.95)}%`;
  return table({
    title: `Estimates of ${ruleLabel(fit.rule)} over simulated records`,
    columns: [
      ...(fit.groups.length > 1 ? [{ key: "group", label: "Group", kind: "text" } as const] : []),
      { key: "name", label: "Parameter", kind: "text" },
      { key: "estimate", label: "Estimate", kind: "estimate", pairedWith: "standardError" },
      { key: "bias", label: "Bias", kind: "number", digits: 2 },
      { key: "standardError", label: "Standard error", kind: "estimate" },
      {
        key: "lower",
        label: `Bootstrap interval ${percent}, from`,
        kind: "estimate",
        pairedWith: "standardError",
      },
      { key: "upper", label: "to", kind: "estimate", pairedWith: "standardError" },
    ],
    rows: drawn.rows.map(({ interval, ...row }) => ({
      ...row,
      lower: interval.lower,
      upper: interval.upper,
    })),
    notes: [
      `${drawn.used} refits with ${drawn.errors} errors, seed ${drawn.seed}; percentiles by definition 7.`,
      ...(drawn.failed > 0 ? [`${drawn.failed} refits found no optimum or were not made.`] : []),
    ],
  });
}

/**
 * Interval of one parameter by simulation at every value tried, which keeps its coverage where the slope of a one-step fit
 * is near 1. The seed is the case's unless one is given.
 *
 * @example gridInterval(fit(crowding, counts, { errors: "process" }), "K", { resamples: 49 }).kind; // "grid"
 */
export function gridInterval(fit: Fit, name: string, options: GridIntervalOptions = {}): Interval {
  checkCall("gridInterval", arguments);
  const interval = seededRun("Simulated records", options, (own) => gridIntervalOf(fit, name, own));
  caseLog.noteStep(`interval of ${name} in "${ruleLabel(fit.rule)}" by simulation at every value`);
  return showing(interval, () => shownTogether([intervalTable(name, interval)]));
}

function intervalTable(name: string, { level, lower, upper, note }: Interval): Table {
  return table({
    title: `Interval of ${name} by simulation at every value`,
    columns: [
      { key: "lower", label: `${100 * level}% interval, from`, kind: "number", digits: 4 },
      { key: "upper", label: "to", kind: "number", digits: 4 },
    ],
    rows: [{ lower: lower ?? "none", upper: upper ?? "none" }],
    notes: [note],
  });
}

/**
 * Adds later rows of the record to a fit and fits again; the result shows what changed.
 *
 * @example
 * const early = observations({ hour: [0, 1, 2, 3, 4, 5, 6], N: [10, 18, 31, 50, 69, 85, 93] }, { period: "hour", step: { every: 1, of: "hour" }, value: "N" });
 * const later = observations({ hour: [7, 8], N: [96, 99] }, { period: "hour", step: { every: 1, of: "hour" }, value: "N" });
 * updateFit(fit(crowding, early, { errors: "observation" }), later).added[""]; // 2
 */
export function updateFit(before: Fit, later: Observations): UpdatedFit {
  checkCall("updateFit", arguments);
  const extended = extendFit(before, later);
  const added = Object.values(extended.added).reduce((sum, count) => sum + count, 0);
  caseLog.noteStep(`"${ruleLabel(before.rule)}" fitted again with ${added} later rows`);
  return showing(presentFitIn(extended), () => shownTogether([changesTable(before, extended)]));
}

function changesTable(before: Fit, { changes, added, remarks }: EngineUpdatedFit): Table {
  const rows = Object.entries(added).map(([group, count]) => `${count} rows added${group && ` to ${group}`}`);
  return table({
    title: `What later rows changed in ${ruleLabel(before.rule)}`,
    columns: [
      ...(before.groups.length > 1 ? [{ key: "group", label: "Group", kind: "text" } as const] : []),
      { key: "name", label: "Parameter", kind: "text" },
      { key: "was", label: "Before", kind: "estimate", pairedWith: "standardErrorWas" },
      { key: "errorWas", label: "Standard error", kind: "number", digits: 2 },
      { key: "now", label: "Now", kind: "estimate", pairedWith: "standardErrorNow" },
      { key: "errorNow", label: "Standard error", kind: "number", digits: 2 },
    ],
    rows: changes.map((change) => ({
      ...change,
      errorWas: change.standardErrorWas ?? "not determined",
      errorNow: change.standardErrorNow ?? "not determined",
    })),
    notes: [`${rows.join("; ")}.`, ...remarks],
  });
}
