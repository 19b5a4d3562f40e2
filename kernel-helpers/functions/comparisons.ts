import { type Comparison, compare as compareFits, type RollingOrigin } from "../../src/evidence/index.js";
import { frozenCopy } from "../../src/numeric/index.js";
import { checkCall } from "../options/index.js";
import { runShown } from "../progress/index.js";
import type { CompareOptions, Fit } from "../results/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { ruleNotes } from "./rule-title.js";
import { shownTogether } from "./shown-together.js";

/**
 * Sets fits of rival rules side by side; the result shows the table of evidence and its verdict in words, forecasts from
 * earlier parts of the record beside naive ones, and with `decide` what each rule that stands leads to.
 *
 * Fits may be given in a list or one after the other.
 *
 * @example compare([crowdingFit, shelteredFit]).sentence;
 */
export function compare(fits: readonly Fit[], options?: CompareOptions): Comparison;
export function compare(...fits: readonly Fit[]): Comparison;
export function compare(
  ...fitsAndOptions: readonly [...fits: readonly Fit[], options: CompareOptions]
): Comparison;
export function compare(...given: readonly unknown[]): Comparison {
  const call = inList(given);
  checkCall("compare", call);
  const [fits, options = {}] = call as readonly [readonly Fit[], CompareOptions?];
  return runShown("Comparison", frozenCopy(options), (settings) => compared(fits, settings));
}

/** The fits of a call in a list, where they were given one after the other. */
function inList(given: readonly unknown[]): readonly unknown[] {
  const end = given.findIndex((each) => (each as { kind?: unknown } | undefined)?.kind !== "fit");
  if (end === 0) return given;
  return end < 0 ? [given] : [given.slice(0, end), ...given.slice(end)];
}

function compared(fits: readonly Fit[], { decide, ...others }: CompareOptions): Comparison {
  // The fits handed to `decide` are those given here, with their estimates by name.
  const comparison = compareFits(fits, { ...others, ...(decide && { decide: (fit) => decide(fit as Fit) }) });
  caseLog.noteStep(`compared: ${comparison.sentence}`);
  const { rules: supported } = comparison.verdict;
  const ruledOut = comparison.rows.filter(({ rule }) => !supported.includes(rule));
  caseLog.noteVerdict(
    fits,
    ruledOut.map(({ place, rule }) => ({ fit: fits[place]!, label: rule, supported })),
  );
  return showing(comparison, () =>
    shownTogether([
      comparisonTable(comparison, fits),
      comparison.decisions.length > 0 ? decisionsTable(comparison) : undefined,
      comparison.rollingOrigin && forecastsTable(comparison.rollingOrigin, fits),
    ]),
  );
}

function comparisonTable(compared: Comparison, fits: readonly Fit[]): Table {
  return table({
    title: "Rival rules on one record",
    columns: [
      { key: "rule", label: "Rule", kind: "text" },
      { key: "parameters", label: "Unknowns", kind: "integer" },
      { key: "count", label: "Residuals", kind: "integer" },
      { key: "aicCorrected", label: "AICc", kind: "number", digits: 5 },
      { key: "difference", label: "Above the lowest", kind: "number", digits: 3 },
      { key: "weight", label: "Weight", kind: "probability" },
      { key: "determined", label: "Parameters determined", kind: "text" },
    ],
    rows: compared.rows.map((row) => ({ ...row, determined: row.undetermined ? "not all" : "all" })),
    notes: [
      compared.sentence,
      ...ruleNotes(fits.map(({ rule }) => rule)),
      ...compared.likelihoodRatios.map((ratio) => `${ratio.sentence.replace(/\.$/, "")}.`),
      ...compared.notes,
    ],
  });
}

function decisionsTable(compared: Comparison): Table {
  return table({
    title: "What each rule that stands leads to",
    columns: [
      { key: "rule", label: "Rule", kind: "text" },
      { key: "decision", label: "Decision", kind: "text" },
    ],
    rows: compared.decisions.map((decision) => ({ ...decision })),
  });
}

function forecastsTable(rolled: RollingOrigin, [fit]: readonly Fit[]): Table {
  const unit = fit?.observations.states[0]?.unit ?? "";
  const score = { kind: "number", digits: 3, unit } as const;
  const percent = Math.round(100 * rolled.level);
  return table({
    title: "Forecasts from earlier parts of the record",
    columns: [
      { key: "name", label: "Forecast by", kind: "text" },
      { key: "meanAbsoluteError", label: "Mean absolute error", ...score },
      { key: "scaledError", label: "In mean changes of the record", kind: "number", digits: 3 },
      { key: "coverage", label: `Inside the ${percent}% interval`, kind: "percent", digits: 0 },
      { key: "intervalScore", label: "Interval score", ...score },
      { key: "crps", label: "Ranked probability score", ...score },
    ],
    rows: rolled.scores.map((row) => ({
      ...row,
      name: row.kind === "naive" ? `${row.name} (naive)` : row.name,
    })),
    notes: [
      `${rolled.forecasts} values forecast from ${rolled.origins} origins, up to ${rolled.periods} periods ahead; each rule fitted afresh to what was recorded until then.`,
      "Interval score and ranked probability score: lower is better.",
    ],
  });
}
