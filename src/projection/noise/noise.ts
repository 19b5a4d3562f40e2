import { gammaDraw, poissonDraw, type RandomStream } from "../../numeric/index.js";

/**
 * How a value scatters around what the rule gives, by distribution. `normal`: of the given standard deviation, in the
 * state's unit. `lognormal`: a factor exp(sd z) of median 1, as in a fit; with `centre: "mean"` a factor
 * exp(sd z - sd^2/2) of mean 1. `poisson`: a count of that mean. `negative-binomial`: a count
 * of that mean m and variance m + m^2/size. `demographic`: normal of variance `variance` times the level, the sum
 * over individuals.
 */
export type Noise =
  | { readonly distribution: "normal"; readonly sd: number }
  | { readonly distribution: "lognormal"; readonly sd: number; readonly centre?: "median" | "mean" }
  | { readonly distribution: "poisson" }
  | { readonly distribution: "negative-binomial"; readonly size: number }
  | { readonly distribution: "demographic"; readonly variance: number };

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
  /** Least value that the family draws around a value that is not below it; absent for none. */
  readonly least?: number;
}

/** Counts; a value below 0, around which none can be drawn, stays as it is. */
const countDraw = (draw: (mean: number, stream: RandomStream) => number): NoiseDraw =>
  Object.assign((value: number, stream: RandomStream): number => (value < 0 ? value : draw(value, stream)), {
    least: 0,
  });

const normalDraw = (kind: NoiseLot["kind"], centre: number, sd: number): NoiseDraw =>
  Object.assign(
    kind === "amounts"
      ? (value: number, stream: RandomStream): number => value + sd * stream.normal()
      : (value: number, stream: RandomStream): number => value * Math.exp(centre + sd * stream.normal()),
    { lot: { kind, centre, sd } },
  );

/** The draw of a family. */
export function noiseDraw(noise: Noise): NoiseDraw {
  switch (noise.distribution) {
    case "normal":
      return normalDraw("amounts", 0, noise.sd);
    case "lognormal":
      return normalDraw("factors", noise.centre === "mean" ? -0.5 * noise.sd * noise.sd : 0, noise.sd);
    case "poisson":
      return countDraw(poissonDraw);
    case "negative-binomial": {
      const { size } = noise;
      return countDraw((value, stream) => poissonDraw((value / size) * gammaDraw(size, stream), stream));
    }
    case "demographic": {
      const { variance } = noise;
      return (value, stream) => value + Math.sqrt(variance * Math.max(0, value)) * stream.normal();
    }
  }
}
