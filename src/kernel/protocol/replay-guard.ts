const remembered = 65_536;

/**
 * Remembers the signatures it has seen, so that a recorded message cannot be sent again.
 * Unsigned messages (empty) are never refused. The older half is forgotten when the memory is full.
 */
export function replayGuard(): (signature: string) => boolean {
  let recent = new Set<string>();
  let older = new Set<string>();
  return (signature) => {
    if (signature === "") return true;
    if (recent.has(signature) || older.has(signature)) return false;
    if (recent.size >= remembered / 2) {
      older = recent;
      recent = new Set();
    }
    recent.add(signature);
    return true;
  };
}
