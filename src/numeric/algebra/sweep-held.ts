/**
 * The inverse of the second derivatives by the arguments that move, from that by all of them [size, size]: each held
 * argument is swept out, as in a conditional covariance.
 */
export function sweepHeld(inverse: Float64Array, held: readonly boolean[]): Float64Array {
  if (!held.includes(true)) return inverse;
  const size = held.length;
  const swept = inverse.slice();
  held.forEach((isHeld, h) => {
    const pivot = swept[h * size + h]!;
    if (!isHeld || !(pivot > 0)) return;
    const column = Float64Array.from({ length: size }, (_, i) => swept[i * size + h]!);
    for (let k = 0; k < swept.length; k++)
      swept[k] = swept[k]! - (column[Math.floor(k / size)]! * column[k % size]!) / pivot;
  });
  return swept;
}
