import type { Fit } from "../../src/estimate/index.js";
import { type Comparison, compare as compareFits } from "../../src/evidence/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { shownTogether } from "./shown-together.js";

/**
 * Sets fits of rival rules side by side; the result shows the table of evidence and its verdict in words.
 *
 * @example compare([crowdingFit, shelteredFit]).sentence;
 */
export function compare(fits: readonly Fit[]): Comparison {
  const compared = compareFits(fits);
  caseLog.noteStep(`compared: ${compared.sentence}`);
  return showing({ ...compared }, () => shownTogether([comparisonTable(compared)]));
}

function comparisonTable(compared: Comparison): Table {
  return table({
    title: "Rival rules on one record",
    columns: [
      { key: "rule", label: "Rule", kind: "text" },
      { key: "unknowns", label: "Unknowns", kind: "integer" },
      { key: "count", label: "Residuals", kind: "integer" },
      { key: "aicCorrected", label: "AICc", kind: "number", digits: 5 },
      { key: "difference", label: "Above the lowest", kind: "number", digits: 3 },
      { key: "weight", label: "Weight", kind: "probability" },
      { key: "undetermined", label: "A constant not determined", kind: "text" },
    ],
    rows: compared.rows.map((row) => ({ ...row })),
    notes: [compared.sentence, ...compared.notes],
  });
}
