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
    const pivot = list[(from + to) >> 1]!;
    let i = from;
    let j = to;
    while (i <= j) {
      while (list[i]! < pivot) i++;
      while (list[j]! > pivot) j--;
      if (i > j) break;
      const held = list[i]!;
      list[i++] = list[j]!;
      list[j--] = held;
    }
    if (place <= j) to = j;
    else if (place >= i) from = i;
    else break;
  }
  return list[place]!;
}
