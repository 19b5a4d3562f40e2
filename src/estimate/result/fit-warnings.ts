import type { Warning } from "../../numeric/index.js";
import { nonsmoothCalls, type Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import type { Optimum } from "../search/optimum.js";
import type { Unknowns } from "../unknowns/unknowns.js";
import { correlationWarnings } from "./correlation-warnings.js";
import type { Estimate } from "./estimate-of.js";
import type { GroupFit } from "./group-fit.js";
import { overdispersionWarnings } from "./overdispersion.js";
import { slopeWarnings } from "./slope-warnings.js";

/**
 * Values an unknown below which a fit carries a caution: common practice, no source. Intervals cover with fewer still where
 * the rule and its errors are right, but whether they are can then hardly be seen.
 */
const comfortable = 3;

/** What a fit's warnings are drawn from. */
export interface FitContext {
  readonly rule: Rule;
  readonly options: FitOptions;
  readonly unknowns: Unknowns;
  readonly found: Optimum;
  /** Of what was searched, which may be several groups. */
  readonly size: { readonly values: number; readonly unknowns: number };
}

/** What a reader of the fit must know, besides its numbers. */
export function fitWarnings(fit: Omit<GroupFit, "warnings">, context: FitContext): readonly Warning[] {
  return [
    ...stopWarning(fit),
    ...undetermined(fit, context),
    ...spreadsNotSeparated(fit, context.options),
    ...atBounds(fit, context.unknowns),
    ...rivals(fit),
    ...correlationWarnings(fit),
    ...bends(fit, context.rule),
    ...slopeWarnings(fit, context),
    ...fewValues(context.size),
    ...overdispersionWarnings(fit.overdispersion),
  ];
}

function stopWarning(fit: Omit<GroupFit, "warnings">): Warning[] {
  if (fit.stop.kind === "converged") return [];
  const why = fit.stop.kind === "failed" ? fit.stop.reason : "it ran out of iterations";
  return [
    {
      code: "not-converged",
      message: `The fit did not converge (${why}); do not use these estimates. Give \`start\` or \`bounds\`.`,
    },
  ];
}

function undetermined(fit: Omit<GroupFit, "warnings">, { found }: FitContext): Warning[] {
  const loose = fit.estimates.filter((each) => each.standardError === undefined && each.role !== "scale");
  const together = loose.filter((each) => !found.separable[fit.estimates.indexOf(each)]);
  const combination =
    together.length > 1
      ? `only a combination of ${together.map(({ name }) => name).join(" and ")} enters`
      : "no value of it changes the fit";
  const reason = (each: Estimate): string => {
    const towards = found.unbounded[fit.estimates.indexOf(each)]!;
    if (towards * each.value > 0) return "it has no finite optimum";
    return together.includes(each) ? combination : each.profile.note || "its profile has no limit";
  };
  return loose.map((each) => ({
    code: "not-determined",
    message: `${each.name} is not determined by this record (${reason(each)}).`,
  }));
}

/**
 * The split of process and observation error, or a dispersion, that the record leaves open. An observation error whose
 * interval reaches 0 beside a process error whose interval does not is a result like any other.
 */
function spreadsNotSeparated(fit: Omit<GroupFit, "warnings">, options: FitOptions): Warning[] {
  const scales = fit.estimates.filter(({ role }) => role === "scale");
  const loose = scales.filter(({ standardError }) => standardError === undefined);
  const processStands =
    loose.length < scales.length && loose.every(({ name }) => name.startsWith("observation"));
  if (loose.length === 0 || processStands) return [];
  const limits = loose.map(
    ({ name, profile }) => `${name} from ${shown(profile.lower, "0")} to ${shown(profile.upper, "no limit")}`,
  );
  const both = fit.filter !== undefined || fit.estimates.some(({ name }) => name.startsWith("process error"));
  return [
    {
      code: both ? "errors-not-separated" : "not-determined",
      message: both
        ? `The record separates the two errors only weakly (${limits.join("; ")}). ${separationAdvice(fit, options)}`
        : `The record gives no two-sided interval: ${limits.join("; ")}.`,
    },
  ];
}

/** What parts the two errors better: the standard deviation of a reading, or more of the record where that is given. */
function separationAdvice({ points }: Omit<GroupFit, "warnings">, options: FitOptions): string {
  if (options.sd !== undefined)
    return "Beside the `sd` given, its readings are too few to tell how large the process error is: check `sd`, or add periods to the record.";
  const size = points.reduce((sum, { observed }) => sum + Math.abs(observed), 0) / points.length;
  const example = onLogScale(options)
    ? "`sd: 0.15` on the log scale (a coefficient of variation of 15%)"
    : `for instance \`sd: ${Number((0.05 * size).toPrecision(1))}\`, in the record's unit (5% of its mean size)`;
  return `Where the standard deviation of a reading is known, from replicates or a survey's error, give it: ${example}.`;
}

const shown = (limit: number | undefined, none: string): string => limit?.toPrecision(3) ?? none;

function atBounds(fit: Omit<GroupFit, "warnings">, unknowns: Unknowns): Warning[] {
  return fit.estimates
    .filter(({ value }, i) => value === unknowns.lower[i] || value === unknowns.upper[i])
    .filter(({ role }) => role !== "scale")
    .map((estimate) => ({
      code: "at-bound",
      message: `${estimate.name} sits on its bound ${estimate.value}: its interval is one-sided at best.`,
    }));
}

function rivals(fit: Omit<GroupFit, "warnings">): Warning[] {
  if (fit.rivals.length === 0) return [];
  const told = fit.rivals.map(({ estimates, behind }) => {
    const values = estimates.map((value, i) => `${fit.estimates[i]!.name} ${value.toPrecision(4)}`);
    return `${values.join(", ")} (${behind.toFixed(2)} log-likelihood units behind)`;
  });
  return [
    {
      code: "two-optima",
      message: `Different parameters explain the record almost equally: ${told.join("; ")}. Give \`start\` or \`bounds\` if one can be ruled out.`,
    },
  ];
}

/** At a smooth optimum the search ends on its gradient; on a bend of the rule it cannot. */
function bends(fit: Omit<GroupFit, "warnings">, rule: Rule): Warning[] {
  const [bend] = nonsmoothCalls(rule).kinks;
  const smooth = fit.stop.kind === "converged" && fit.stop.test === "gradient";
  if (bend === undefined || smooth) return [];
  return [
    {
      code: "on-a-bend",
      message: `The optimum lies at a kink of the rule, at ${bend.function}(...): its standard errors do not hold there. Read the profiles.`,
    },
  ];
}

function fewValues({ values, unknowns }: FitContext["size"]): Warning[] {
  if (values >= comfortable * unknowns) return [];
  return [
    {
      code: "few-values",
      message: `${values} values for ${unknowns} unknowns: fewer than ${comfortable} each, too few to check the rule and its errors.`,
    },
  ];
}
