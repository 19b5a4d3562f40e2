import { type LinearisedSystem, rotateRowIn } from "../../numeric/index.js";

/** Pull of a population on the parameters of a group. */
export interface Penalty {
  /** [parameters]: mean of the population, and root of the weight of (parameter - mean)^2; changed in place. */
  readonly means: Float64Array;
  readonly roots: Float64Array;
}

/** A group's least-squares system with its first unknowns, the parameters, drawn towards the means of a population. */
export function penalisedSystem(system: LinearisedSystem, { means, roots }: Penalty): LinearisedSystem {
  const { size } = system;
  const triangle = new Float64Array(size * size);
  const projected = new Float64Array(size);
  const row = new Float64Array(size);
  const at = new Float64Array(size);
  return {
    size,
    triangle,
    projected,
    evaluate(parameters) {
      at.set(parameters);
      let sum = system.evaluate(parameters);
      for (let k = 0; k < means.length; k++) sum += (roots[k]! * (parameters[k]! - means[k]!)) ** 2;
      return sum;
    },
    linearise(parameters) {
      if (!system.linearise(parameters)) return false;
      triangle.set(system.triangle);
      projected.set(system.projected);
      for (let k = 0; k < means.length; k++) {
        row.fill(0);
        row[k] = roots[k]!;
        rotateRowIn(triangle, projected, row, roots[k]! * (at[k]! - means[k]!), k, size, size);
      }
      return true;
    },
  };
}
