import type { Fit } from "../../src/estimate/index.js";
import { sameParameters as askParameters, type SameParameters } from "../../src/evidence/index.js";
import { ruleLabel } from "../../src/rule/index.js";
import { checkCall } from "../options/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { presentFit } from "./show-fit.js";
import { shownTogether } from "./shown-together.js";

/**
 * Asks whether all groups of a record have the same parameters; the result shows the F test, where groups have one
 * sigma, and the likelihood ratio, where each has its own.
 *
 * @example sameParameters(flasksFit).sentence.slice(0, 11); // "No evidence"
 */
export function sameParameters(fit: Fit): SameParameters {
  checkCall("sameParameters", arguments);
  const asked = askParameters(fit);
  presentFit(asked.combined);
  presentFit(asked.separate);
  caseLog.noteStep(`same parameters for all groups: ${asked.sentence}`);
  return showing(asked, () => shownTogether([testsTable(asked)]));
}

function testsTable({ test, likelihoodRatio, sentence, combined }: SameParameters): Table {
  const ratio = {
    name: "Likelihood ratio, a sigma for each group",
    ...likelihoodRatio,
    degreesOfFreedom: String(likelihoodRatio.degreesOfFreedom),
  };
  return table({
    title: `Same parameters for all groups: ${ruleLabel(combined.rule)}`,
    columns: [
      { key: "name", label: "Test", kind: "text" },
      { key: "statistic", label: "Statistic", kind: "number", digits: 3 },
      { key: "degreesOfFreedom", label: "Degrees of freedom", kind: "text" },
      { key: "probability", label: "p-value", kind: "probability" },
    ],
    rows: [
      ...(test
        ? [
            {
              name: "F, one sigma for all groups",
              ...test,
              degreesOfFreedom: test.degreesOfFreedom.join(" and "),
            },
          ]
        : []),
      ratio,
    ],
    notes: [sentence],
  });
}
