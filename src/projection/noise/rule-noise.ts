import type { ProcessNoise, Rule } from "../../rule/index.js";
import { refuseNoise } from "../refusals.js";
import type { Noise } from "./noise.js";

/** By state in order: the random change asked for, else the rule's own; a parameter's name replaced by its value. */
export function ruleNoise(
  rule: Rule,
  parameters: Float64Array,
  asked: Readonly<Record<string, Noise | ProcessNoise>> | undefined,
): readonly (Noise | undefined)[] {
  for (const state of Object.keys(asked ?? {}))
    if (!rule.states.includes(state))
      throw refuseNoise(state, `the rule has no such state (it has ${rule.states.join(", ")})`);
  return rule.states.map((state) => {
    const noise = asked?.[state] ?? (asked === undefined ? rule.noise[state] : undefined);
    return noise && settled(rule, parameters, state, noise);
  });
}

function settled(rule: Rule, parameters: Float64Array, state: string, noise: Noise | ProcessNoise): Noise {
  if (noise.distribution === "poisson") return noise;
  if (noise.distribution === "negative-binomial") return positive(state, noise, noise.size, "size");
  if (noise.distribution === "demographic") return positive(state, noise, noise.variance, "variance");
  const { sd } = noise;
  if (typeof sd === "number") return positive(state, { ...noise, sd }, sd, "sd");
  const place = rule.parameters.indexOf(sd);
  if (place < 0) throw refuseNoise(state, `"${sd}" is no parameter of the rule`);
  const value = parameters[place]!;
  return positive(state, { ...noise, sd: value }, value, "sd");
}

function positive(state: string, noise: Noise, value: number, what: string): Noise {
  if (!(value >= 0 && Number.isFinite(value)))
    throw refuseNoise(state, `its ${what} is ${value}, which is not positive`);
  return noise;
}
