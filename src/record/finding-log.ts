import type { Decision } from "./decisions/decision.js";
import type { Finding } from "./finding.js";

/** Collects what is found. Of one kind a hundred are kept in full; the rest are counted in a last line. */
export interface FindingLog {
  note(finding: Finding): void;
  /** A correction made because the analyst chose it. */
  decide(decision: Decision): void;
  decisions(): readonly Decision[];
  /** Rows that any finding names, kept or only counted. */
  flagged(): number;
  all(): readonly Finding[];
}

const keptOfAKind = 100;

export function findingLog(): FindingLog {
  const kept: Finding[] = [];
  const counts = new Map<string, number>();
  const rows = new Set<number>();
  const decisions: Decision[] = [];
  return {
    decide: (decision) => {
      decisions.push(decision);
    },
    decisions: () => decisions,
    note(finding) {
      if (finding.row !== undefined) rows.add(finding.row);
      const count = (counts.get(finding.kind) ?? 0) + 1;
      counts.set(finding.kind, count);
      if (count <= keptOfAKind) kept.push(finding);
    },
    flagged: () => rows.size,
    all() {
      const more = [...counts].filter(([, count]) => count > keptOfAKind);
      return [...kept, ...more.map(([kind, count]) => untold(kind, count - keptOfAKind))];
    },
  };
}

function untold(kind: string, count: number): Finding {
  return {
    kind,
    row: undefined,
    column: "",
    value: "",
    message: `${count} more findings of the kind "${kind}" are counted and not listed.`,
    done: "as for those listed",
  };
}
