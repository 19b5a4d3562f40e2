import type { RandomStream } from "../../numeric/index.js";
import { gammaDraw } from "./gamma-draw.js";
import { poissonDraw } from "./poisson-draw.js";

/**
 * How a value scatters around what the rule gives, by family. `additive`: normal of the given standard deviation, in
 * the state's unit. `lognormal`: a factor exp(sd z - sd^2/2), of mean 1. `log-normal-errors`: a factor exp(sd z), of
 * median 1, as a fit with proportional spread means it. `poisson`: a count of that mean. `negative-binomial`: a count
 * of that mean m and variance m + m^2/size. `demographic`: normal of variance `variance` times the level, the sum
 * over individuals.
 */
export type Noise =
  | { readonly kind: "additive" | "lognormal" | "log-normal-errors"; readonly sd: number }
  | { readonly kind: "poisson" }
  | { readonly kind: "negative-binomial"; readonly size: number }
  | { readonly kind: "demographic"; readonly variance: number };

/** How the normal errors of many values are made at once: as amounts sd z, or as factors exp(centre + sd z). */
export interface NoiseLot {
  readonly kind: "amounts" | "factors";
  readonly centre: number;
  readonly sd: number;
}

/** Scatters one value; a family of normal errors says how many values are scattered at once. */
export interface NoiseDraw {
  (value: number, stream: RandomStream): number;
  readonly lot?: NoiseLot;
}

const normalDraw = (kind: NoiseLot["kind"], centre: number, sd: number): NoiseDraw =>
  Object.assign(
    kind === "amounts"
      ? (value: number, stream: RandomStream): number => value + sd * stream.normal()
      : (value: number, stream: RandomStream): number => value * Math.exp(centre + sd * stream.normal()),
    { lot: { kind, centre, sd } },
  );

/** The draw of a family. */
export function noiseDraw(noise: Noise): NoiseDraw {
  switch (noise.kind) {
    case "additive":
      return normalDraw("amounts", 0, noise.sd);
    case "lognormal":
      return normalDraw("factors", -0.5 * noise.sd * noise.sd, noise.sd);
    case "log-normal-errors":
      return normalDraw("factors", 0, noise.sd);
    case "poisson":
      return poissonDraw;
    case "negative-binomial": {
      const { size } = noise;
      return (value, stream) => poissonDraw((value / size) * gammaDraw(size, stream), stream);
    }
    case "demographic": {
      const { variance } = noise;
      return (value, stream) => value + Math.sqrt(variance * Math.max(0, value)) * stream.normal();
    }
  }
}
