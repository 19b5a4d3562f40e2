/** "1 hour", "12 hours", "2 half-hours": a number of units as it is said. */
export function unitText(count: number, unit: string): string {
  const written = Number(count.toPrecision(12));
  return `${written} ${written === 1 || unit.endsWith("s") ? unit : `${unit}s`}`;
}

/** "1 and 2", "1, 2 and 3". */
export function listText(parts: readonly (string | number)[]): string {
  return parts.length < 2 ? parts.join("") : `${parts.slice(0, -1).join(", ")} and ${parts.at(-1)}`;
}
