const first = Number.EPSILON ** 0.25;

/**
 * Second derivatives [size, size] of a function at a minimum, by central differences extrapolated once. Steps are taken
 * so long that the function rises by about `rise` along each argument, which keeps rounding out.
 *
 * @param rise - in the function's unit; for twice a negative log-likelihood 0.01 is a tenth of a standard error.
 */
export function secondDerivatives(
  of: (at: Float64Array) => number,
  at: Float64Array,
  rise = 0.01,
): Float64Array {
  const size = at.length;
  const value = of(at);
  const steps = Float64Array.from(at, (_, i) => stepFor(of, at, value, i, rise));
  const wide = differences(of, at, value, steps);
  const narrow = differences(
    of,
    at,
    value,
    steps.map((step) => step / 2),
  );
  return Float64Array.from({ length: size * size }, (_, k) => (4 * narrow[k]! - wide[k]!) / 3);
}

/** The step along argument i at which the function rises by about `rise`. */
function stepFor(
  of: (at: Float64Array) => number,
  at: Float64Array,
  value: number,
  i: number,
  rise: number,
): number {
  const here = at[i]!;
  let step = first * (Math.abs(here) || 1);
  for (let round = 0; round < 30; round++) {
    const reached = 0.5 * (moved(of, at, i, step) + moved(of, at, i, -step)) - value;
    if (reached > 0.3 * rise && reached < 3 * rise) break;
    const factor =
      Number.isFinite(reached) && reached > 0 ? Math.sqrt(rise / reached) : reached > 0 ? 0.1 : 10;
    step *= Math.min(Math.max(factor, 0.1), 10);
  }
  return step;
}

function moved(of: (at: Float64Array) => number, at: Float64Array, i: number, step: number): number {
  const here = at[i]!;
  at[i] = here + step;
  const value = of(at);
  at[i] = here;
  return value;
}

function differences(
  of: (at: Float64Array) => number,
  at: Float64Array,
  value: number,
  steps: Float64Array,
): Float64Array {
  const size = at.length;
  const table = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    const along = moved(of, at, i, steps[i]!) + moved(of, at, i, -steps[i]!);
    table[i * size + i] = (along - 2 * value) / steps[i]! ** 2;
    for (let j = 0; j < i; j++) {
      const mixed =
        corner(of, at, i, j, steps, 1, 1) -
        corner(of, at, i, j, steps, 1, -1) -
        corner(of, at, i, j, steps, -1, 1) +
        corner(of, at, i, j, steps, -1, -1);
      table[i * size + j] = mixed / (4 * steps[i]! * steps[j]!);
      table[j * size + i] = table[i * size + j]!;
    }
  }
  return table;
}

function corner(
  of: (at: Float64Array) => number,
  at: Float64Array,
  i: number,
  j: number,
  steps: Float64Array,
  signI: number,
  signJ: number,
): number {
  const here = at[i]!;
  at[i] = here + signI * steps[i]!;
  const value = moved(of, at, j, signJ * steps[j]!);
  at[i] = here;
  return value;
}
