import { type Fit, type FitProblem, problemOf } from "../../estimate/index.js";
import { ruleLabel, ruleLines } from "../../rule/index.js";

type Aspect = (fit: Fit) => string;

const aspect =
  (name: keyof FitProblem["aspects"]): Aspect =>
  (fit) =>
    problemOf(fit).aspects[name];

/** What a label says of every fit wherever the fits differ in it. */
const told: readonly Aspect[] = [aspect("errors"), aspect("distribution"), aspect("groups")];

/** What a label says besides where the fits would still be called the same; "" is not said. */
const toldAtNeed: readonly Aspect[] = [
  ({ rule }) => (rule.name === undefined ? "" : ruleLines(rule)),
  aspect("held"),
  aspect("sd"),
  aspect("robust"),
  aspect("bounds"),
  aspect("initial"),
  aspect("factor"),
];

/**
 * What rivals are called beside each other: each by its rule and by what the fits differ in, so that no two are called
 * the same ("crowding, lognormal" and "crowding, normal"); fits alike in all that can be said are numbered.
 *
 * @example fitLabels([crowdingFit, shelteredFit])[0]; // "ΔN = r*N*(1 - N/K)"
 */
export function fitLabels(fits: readonly Fit[]): readonly string[] {
  const differing = told.filter((of) => new Set(fits.map(of)).size > 1);
  let labels = fits.map((fit) => [ruleLabel(fit.rule), ...differing.map((of) => of(fit))].join(", "));
  for (const of of toldAtNeed) labels = toldApart(labels, fits.map(of));
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
