/** Median of a list; NaN of none. The list is rearranged as far as finding its middle asks (Hoare, 1961). */
export function middle(list: Float64Array): number {
  const half = list.length >> 1;
  if (list.length === 0) return Number.NaN;
  const upper = smallest(list, half);
  if (list.length % 2 === 1) return upper;
  let lower = list[0]!;
  for (let i = 1; i < half; i++) if (list[i]! > lower) lower = list[i]!;
  return (lower + upper) / 2;
}

/** The value that a sorted list would have at `place`; all before it in the list are then no larger. */
function smallest(list: Float64Array, place: number): number {
  let from = 0;
  let to = list.length - 1;
  while (from < to) {
    const [low, high] = parted(list, from, to);
    if (place <= high) to = high;
    else if (place >= low) from = low;
    else break;
  }
  return list[place]!;
}

/** Parts a stretch at the value in its middle: up to the second place none is larger, from the first on none smaller. */
function parted(list: Float64Array, from: number, to: number): readonly [number, number] {
  const pivot = list[(from + to) >> 1]!;
  let i = from;
  let j = to;
  for (;;) {
    while (list[i]! < pivot) i++;
    while (list[j]! > pivot) j--;
    if (i > j) return [i, j];
    const held = list[i]!;
    list[i++] = list[j]!;
    list[j--] = held;
  }
}
