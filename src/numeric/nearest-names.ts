/** Number of single-letter insertions, deletions, replacements or swaps of neighbours between two words. */
export function editDistance(a: string, b: string): number {
  let before: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = last[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      let best = Math.min(change, last[j]! + 1, row[j - 1]! + 1);
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      if (swapped) best = Math.min(best, before[j - 2]! + 1);
      row.push(best);
    }
    before = last;
    last = row;
  }
  return last[b.length]!;
}

/** " Did you mean "a" or "b"?" behind an error about a name; "" where no known name is near. */
export const didYouMean = (nearest: readonly string[]): string =>
  nearest.length === 0 ? "" : ` Did you mean "${nearest.join('" or "')}"?`;

/** Known names close enough to a mistyped one, nearest first; names that differ only in case come first. */
export function nearestNames(name: string, known: readonly string[]): readonly string[] {
  const reach = name.length <= 3 ? 1 : name.length <= 6 ? 2 : 3;
  return known
    .map((candidate) => ({
      candidate,
      distance:
        candidate.toLowerCase() === name.toLowerCase() ? 0 : editDistance(name.slice(0, 60), candidate),
    }))
    .filter(({ distance }) => distance <= reach)
    .sort((a, b) => a.distance - b.distance)
    .slice(0, 3)
    .map(({ candidate }) => candidate);
}
