/**
 * Unique, non-empty column names: an empty one becomes "column 3", a second "owed" becomes "owed (2)".
 *
 * @param found - receives a sentence for every name that was changed.
 */
export function columnNames(header: readonly string[], found: string[]): readonly string[] {
  const used = new Set<string>();
  return header.map((cell, i) => {
    const trimmed = cell.trim();
    const plain = trimmed === "" ? `column ${i + 1}` : trimmed;
    let name = plain;
    for (let n = 2; used.has(name); n++) name = `${plain} (${n})`;
    used.add(name);
    if (trimmed === "") found.push(`Column ${i + 1} has no name; it is called "${name}".`);
    else if (name !== plain)
      found.push(`Column ${i + 1} repeats the name "${plain}"; it is called "${name}".`);
    return name;
  });
}
