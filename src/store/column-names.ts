/**
 * Names that can be asked for: an empty one becomes "column 3", a second "owed" becomes "owed (2)".
 *
 * @param found - takes a sentence for every name that was changed.
 */
export function columnNames(header: readonly string[], found: string[]): readonly string[] {
  const taken = new Set<string>();
  return header.map((cell, i) => {
    const written = cell.trim();
    const plain = written === "" ? `column ${i + 1}` : written;
    let name = plain;
    for (let n = 2; taken.has(name); n++) name = `${plain} (${n})`;
    taken.add(name);
    if (written === "") found.push(`Column ${i + 1} has no name and is called "${name}".`);
    else if (name !== plain)
      found.push(`Another column is named "${plain}"; column ${i + 1} is called "${name}".`);
    return name;
  });
}
