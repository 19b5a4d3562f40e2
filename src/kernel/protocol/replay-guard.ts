const capacity = 65_536;

/**
 * Rejects signatures that were seen before, so that a recorded message cannot be replayed. Unsigned messages (empty)
 * always pass. The older half is dropped when the capacity is reached.
 */
export function replayGuard(): (signature: string) => boolean {
  let recent = new Set<string>();
  let older = new Set<string>();
  return (signature) => {
    if (signature === "") return true;
    if (recent.has(signature) || older.has(signature)) return false;
    if (recent.size >= capacity / 2) {
      older = recent;
      recent = new Set();
    }
    recent.add(signature);
    return true;
  };
}
