import type { Warning } from "../../numeric/index.js";
import type { Observations } from "../../record/index.js";

/** Findings of the whole record that put every estimate in doubt, so that no fit goes without them. */
const doubtful: readonly string[] = ["step-at-odds"];

/** What the record itself warns of. */
export function recordWarnings({ findings }: Observations): Warning[] {
  return findings
    .filter(({ kind }) => doubtful.includes(kind))
    .map(({ kind, message }) => ({ code: kind, message }));
}
