/** ||z||^2 - ||z + R d||^2: by how much the linear model says that the sum of squares falls along the step d. */
export function predictedReduction(
  triangle: Float64Array,
  projected: Float64Array,
  step: Float64Array,
): number {
  const size = step.length;
  let sum = 0;
  for (let i = 0; i < size; i++) {
    let moved = 0;
    for (let j = i; j < size; j++) moved += triangle[i * size + j]! * step[j]!;
    sum -= moved * (2 * projected[i]! + moved);
  }
  return sum;
}

/** z'R d: half the slope of the sum of squares along the step d. */
export function slopeAlong(triangle: Float64Array, projected: Float64Array, step: Float64Array): number {
  const size = step.length;
  let sum = 0;
  for (let i = 0; i < size; i++) {
    for (let j = i; j < size; j++) sum += projected[i]! * triangle[i * size + j]! * step[j]!;
  }
  return sum;
}
