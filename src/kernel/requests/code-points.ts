/** The protocol counts Unicode code points; JavaScript and the compiler count UTF-16 units. */
export function toUnits(text: string, codePoints: number): number {
  let units = 0;
  let left = codePoints;
  for (const point of text) {
    if (left-- <= 0) break;
    units += point.length;
  }
  return units;
}

export function toCodePoints(text: string, units: number): number {
  return [...text.slice(0, units)].length;
}
