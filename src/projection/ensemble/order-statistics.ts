/**
 * Moves the order statistics of the given ranks to their places, without sorting the rest.
 *
 * @param values - reordered in place.
 * @param ranks - whole places from 0, increasing.
 * @see Hoare (1961), Algorithm 65: Find, CACM 4:321, here for several ranks in one descent.
 */
export function placeRanks(values: Float64Array, ranks: readonly number[]): void {
  placeWithin(values, 0, values.length - 1, ranks, 0, ranks.length);
}

/** Ranges this short are sorted outright. */
const short = 600;

function placeWithin(
  values: Float64Array,
  first: number,
  last: number,
  ranks: readonly number[],
  from: number,
  to: number,
): void {
  if (from >= to) return;
  if (last - first < short) {
    values.subarray(first, last + 1).sort();
    return;
  }
  const [low, high] = partition(values, first, last);
  let middle = from;
  while (middle < to && ranks[middle]! <= low) middle++;
  let beyond = middle;
  while (beyond < to && ranks[beyond]! < high) beyond++;
  placeWithin(values, first, low, ranks, from, middle);
  placeWithin(values, high, last, ranks, beyond, to);
}

/** Splits around the median of three: up to `low` at most the pivot, from `high` at least, between equal to it. */
function partition(values: Float64Array, first: number, last: number): readonly [number, number] {
  const pivot = medianOfThree(values[first]!, values[(first + last) >> 1]!, values[last]!);
  let i = first;
  let j = last;
  while (i <= j) {
    while (values[i]! < pivot) i++;
    while (values[j]! > pivot) j--;
    if (i > j) break;
    const held = values[i]!;
    values[i++] = values[j]!;
    values[j--] = held;
  }
  return [j, i];
}

function medianOfThree(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
}
