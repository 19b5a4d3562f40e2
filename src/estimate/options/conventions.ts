import { useSentences } from "../result/fit-use.js";
import type { GroupFit } from "../result/group-fit.js";
import type { FitOptions } from "./fit-options.js";

/** The conventions behind the numbers of a fit, a sentence each, printed with every table of it. */
export function conventionsOf(options: FitOptions, groups: readonly GroupFit[]): readonly string[] {
  const filter = groups.find((group) => group.filter !== undefined)?.filter;
  return [
    errorSentence(options),
    ...(filter ? [filterSentence(filter)] : []),
    distributionSentence(options),
    intervalSentence(options, groups),
    ...(options.robust === true ? [robustSentence] : []),
    ...groupSentence(options),
    ...useSentences(
      groups.map(({ used }) => used),
      { steps: options.errors !== "observation", counts: isCounts(options) },
    ),
    ...(options.factor === undefined
      ? []
      : ["The record reads a state up to a factor, which counts as an unknown."]),
  ];
}

const robustSentence =
  "Values more than 1.345 robust standard deviations off count for less (Huber's weights); standard errors and intervals by Huber's formula, sigma that of all residuals, so that a future value may lie as far off.";

function isCounts({ distribution }: FitOptions): boolean {
  return distribution === "poisson" || distribution === "negative-binomial";
}

function errorSentence({ errors }: FitOptions): string {
  if (errors === "observation")
    return "Error in the observation: whole trajectory fitted, initial state estimated unless given.";
  return errors === "process"
    ? "Error in the process: each step fitted from the recorded value before it; over a gap by as many steps, with the variance that their errors add up to."
    : "Error in both the process and the observation: likelihood of the readings by the Kalman filter.";
}

function filterSentence({ method, start, check }: NonNullable<GroupFit["filter"]>): string {
  const filter =
    method === "exact"
      ? "The filter is exact, the rule being linear on the fitting scale"
      : "The filter takes the rule's slope at the estimated state (extended)";
  return `${filter}; ${startSentences[start]}.${checkSentence(check)}`;
}

const startSentences: Readonly<Record<NonNullable<GroupFit["filter"]>["start"], string>> = {
  stationary: "the first reading is taken from the rule's long-run distribution (stationary start)",
  diffuse: "the first reading is taken as read and left out of the likelihood (diffuse start)",
  known: "the first state is known (`initial`), and the first reading is left out of the likelihood",
};

function checkSentence(check: NonNullable<GroupFit["filter"]>["check"]): string {
  if (check === undefined) return "";
  const { filter, particles, deviation, lost, of } = check;
  if (particles === undefined)
    return ` Particles could not check the filter: in ${lost} of ${of} runs none of them came near some reading, as where readings have almost no error.`;
  const runs = lost > 0 ? `, ${lost} of ${of} runs lost` : "";
  return ` Log-likelihood ${filter.toFixed(2)}, by particles ${particles.toFixed(2)} (sd ${deviation!.toFixed(2)}${runs}).`;
}

function distributionSentence({ distribution = "normal", sd, errors }: FitOptions): string {
  const scale = distribution === "lognormal" ? " on the log scale" : "";
  const whose = errors === "both" ? "observation errors" : "errors";
  if (typeof sd === "string")
    return `Normal ${whose}${scale} of known standard deviations, column "${sd}"; a future reading has their root mean square.`;
  if (sd !== undefined) return `Normal ${whose}${scale} of the known standard deviation ${sd}.`;
  switch (distribution) {
    case "lognormal":
      return "Scatter proportional to the level: normal errors on the log scale.";
    case "normal":
      return "The same scatter at every level: normal errors.";
    case "poisson":
      return "Counts: variance equal to the mean (Poisson).";
    case "negative-binomial":
      return "Counts: variance = mean + dispersion * mean^2 (negative binomial).";
  }
}

function intervalSentence(options: FitOptions, groups: readonly GroupFit[]): string {
  const spreads = groups.some((group) => group.estimates.some(({ role }) => role === "scale"));
  const likelihood = spreads || options.distribution === "poisson" || options.sd !== undefined;
  const normal = groups.some((group) =>
    group.estimates.some(({ name, role }) => role === "scale" && name === "sigma"),
  );
  if (normal && options.cut !== "chi-square" && (options.groups ?? "separate") === "separate")
    return "Standard errors by the curvature of the log-likelihood; profile cut n ln(1 + F(1, n - p)/(n - p)), that of least squares; AICc counts every unknown.";
  if (likelihood)
    return "Standard errors by the curvature of the log-likelihood; profile cut chi-square(1); AICc counts every unknown.";
  const cut =
    options.cut === "chi-square" ? "profile cut chi-square(1), sigma^2 = RSS/n" : "profile cut F(1, n - p)";
  return `Standard errors by sigma^2 = RSS/(n - p); ${cut}; AICc by RSS/n on the fitting scale, counting sigma.`;
}

function groupSentence({ groups = "separate" }: FitOptions): string[] {
  if (groups === "combined")
    return ["The same parameters and sigma for all groups, an initial state for each."];
  if (groups === "mixed")
    return [
      "Parameters differ among groups as draws from a normal population, integrated out by Laplace's method; a group's own are drawn towards its means.",
    ];
  return [];
}
