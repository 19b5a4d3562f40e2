/**
 * Covariance of a group's unknowns, given the population's means, with the means' own uncertainty added: C + B V B',
 * where C is the covariance with the means known and B = C W says how far the unknowns follow the means, W being the weights
 * 1/spread^2 of the population.
 *
 * @param own - C, [size, size]; the first `weights.length` unknowns are the parameters.
 * @param means - V, [parameters, parameters]; entries that are not known count as 0.
 * @see Kass, R. E. and Steffey, D. (1989), Journal of the American Statistical Association 84:717.
 */
export function memberCovariance(
  own: Float64Array,
  weights: Float64Array,
  means: Float64Array,
): Float64Array {
  const size = Math.sqrt(own.length);
  const parameters = weights.length;
  const follows = (i: number, k: number): number => own[i * size + k]! * weights[k]!;
  return own.map((entry, at) => {
    const i = Math.floor(at / size);
    const j = at % size;
    let added = 0;
    for (let k = 0; k < parameters; k++)
      for (let l = 0; l < parameters; l++)
        added += follows(i, k) * (means[k * parameters + l]! || 0) * follows(j, l);
    return entry + added;
  });
}
