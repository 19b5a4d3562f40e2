import { badDistributionParameter, badProbability, badValue } from "../refusals.js";
import type { Shape } from "./continuous.js";
import type { WantedTails } from "./tails.js";

/** A probability distribution with its parameters. */
export interface Distribution {
  readonly kind: "distribution";
  readonly name: string;
  readonly parameters: Readonly<Record<string, number>>;
  /** Density at the value, per unit of the value; of a count the probability of exactly that many. */
  readonly density: (value: number) => number;
  /** Probability of at most the value. */
  readonly cumulative: (value: number) => number;
  /** Probability of more than the value: 1 - cumulative, with all its digits where that is small. */
  readonly upperTail: (value: number) => number;
  /** The value not exceeded with the probability; of counts the lowest not exceeded with at least the probability. */
  readonly quantile: (probability: number) => number;
  /** The value exceeded with the probability; of counts the lowest exceeded with at most the probability. */
  readonly upperQuantile: (probability: number) => number;
}

/** What a parameter may be, in words that end "must be ...", and a value to show in a correction. */
export interface Requirement {
  readonly met: (value: number, all: readonly number[]) => boolean;
  readonly words: string;
  readonly example: number;
}

/** A function that makes the distribution of the given parameters, in the order in which they are required. */
export function family(
  name: string,
  shapeOf: (...values: number[]) => Shape,
  required: Readonly<Record<string, Requirement>>,
): (...values: (number | undefined)[]) => Distribution {
  const names = Object.keys(required);
  const example = `distributions.${name}(${names.map((key) => required[key]!.example).join(", ")})`;
  return (...given) => {
    const values = names.map((_, i) => given[i] as number);
    names.forEach((key, i) => {
      const { met, words } = required[key]!;
      if (typeof values[i] !== "number" || !met(values[i]!, values)) {
        throw badDistributionParameter(name, key, words, values[i], example);
      }
    });
    const parameters = Object.fromEntries(names.map((key, i) => [key, values[i]!]));
    return distribution(name, parameters, shapeOf(...values));
  };
}

function distribution(name: string, parameters: Record<string, number>, shape: Shape): Distribution {
  const made: Distribution = {
    kind: "distribution",
    name,
    parameters: Object.freeze(parameters),
    density: (value) => unlessMissing("density", value, shape.density),
    cumulative: (value) => unlessMissing("cumulative", value, () => shape.tails(value).lower),
    upperTail: (value) => unlessMissing("upperTail", value, () => shape.tails(value).upper),
    quantile: (probability) => shape.at(below(checkedProbability("quantile", probability))),
    upperQuantile: (probability) => shape.at(above(checkedProbability("upperQuantile", probability))),
  };
  return Object.freeze(made);
}

/** A missing value keeps its mark. */
function unlessMissing(asked: string, value: number, read: (value: number) => number): number {
  if (typeof value !== "number") throw badValue(asked, value);
  return Number.isNaN(value) ? value : read(value);
}

function below(lower: number): WantedTails {
  return { lower, upper: 1 - lower, given: "lower" };
}

function above(upper: number): WantedTails {
  return { lower: 1 - upper, upper, given: "upper" };
}

function checkedProbability(asked: string, probability: number): number {
  if (!(typeof probability === "number" && probability >= 0 && probability <= 1)) {
    throw badProbability(asked, probability);
  }
  return probability;
}
