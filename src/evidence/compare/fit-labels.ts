import type { Fit } from "../../estimate/index.js";
import { ruleLabel, ruleLines } from "../../rule/index.js";

type Aspect = (fit: Fit) => string;

const errorWords: Readonly<Record<Fit["options"]["errors"], string>> = {
  process: "error in the process",
  observation: "error in the observation",
  both: "error in both",
};

/** What a label says of every fit wherever the fits differ in it. */
const told: readonly Aspect[] = [
  ({ options }) => errorWords[options.errors],
  ({ options }) => options.distribution ?? "normal",
  ({ options }) => `groups ${options.groups ?? "separate"}`,
];

/** What a label says besides where the fits would still be called the same; "" is not said. */
const toldAtNeed: readonly Aspect[] = [
  ({ rule }) => (rule.name === undefined ? "" : ruleLines(rule)),
  ({ rule, options }) =>
    named({ ...rule.fixed, ...options.fixed }, (name, value) => `${name} held at ${value}`),
  ({ options }) => (options.sd === undefined ? "" : `sd ${options.sd}`),
  ({ options }) => (options.robust === true ? "robust" : ""),
  ({ rule, options }) =>
    named({ ...rule.bounds, ...options.bounds }, (name, [low, high]) => `${name} from ${low} to ${high}`),
  ({ rule, options }) =>
    named({ ...rule.initial, ...options.initial }, (name, value) => `${name} begins at ${value}`),
  ({ options }) => named(options.factor ?? {}, (state, name) => `${state} read by the factor ${name}`),
];

function named<T>(given: Readonly<Record<string, T>>, say: (name: string, value: T) => string): string {
  return Object.entries(given)
    .map(([name, value]) => say(name, value))
    .join(", ");
}

/**
 * What rivals are called beside each other: each by its rule and by what the fits differ in, so that no two are called
 * the same ("crowding, lognormal" and "crowding, normal"); fits alike in all that can be said are numbered.
 *
 * @example fitLabels([crowdingFit, shelteredFit])[0]; // "ΔN = r*N*(1 - N/K)"
 */
export function fitLabels(fits: readonly Fit[]): readonly string[] {
  const differing = told.filter((aspect) => new Set(fits.map(aspect)).size > 1);
  let labels = fits.map((fit) => [ruleLabel(fit.rule), ...differing.map((aspect) => aspect(fit))].join(", "));
  for (const aspect of toldAtNeed) labels = toldApart(labels, fits.map(aspect));
  return toldApart(
    labels,
    labels.map((label, i) => `no. ${labels.slice(0, i + 1).filter((other) => other === label).length}`),
  );
}

/** Labels that are still alike, each with what is said of its fit where that tells them apart. */
function toldApart(labels: readonly string[], said: readonly string[]): string[] {
  return labels.map((label, i) => {
    const alike = said.filter((_, k) => labels[k] === label);
    return new Set(alike).size > 1 && said[i] !== "" ? `${label}, ${said[i]}` : label;
  });
}
