import type { RandomStream } from "../numeric/index.js";
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

/** Scatters one value. */
export type NoiseDraw = (value: number, stream: RandomStream) => number;

/** The draw of a family. */
export function noiseDraw(noise: Noise): NoiseDraw {
  switch (noise.kind) {
    case "additive": {
      const { sd } = noise;
      return (value, stream) => value + sd * stream.normal();
    }
    case "lognormal": {
      const { sd } = noise;
      const centre = -0.5 * sd * sd;
      return (value, stream) => value * Math.exp(centre + sd * stream.normal());
    }
    case "log-normal-errors": {
      const { sd } = noise;
      return (value, stream) => value * Math.exp(sd * stream.normal());
    }
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
