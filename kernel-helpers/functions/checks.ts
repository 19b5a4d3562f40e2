import type { Fit } from "../../src/estimate/index.js";
import { type CheckOptions, check as checkFit, type Check as EngineCheck } from "../../src/evidence/index.js";
import { ruleLabel } from "../../src/rule/index.js";
import { checkCall } from "../options/index.js";
import type { Check } from "../results/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { periodColumn } from "./across-periods.js";
import { caseLog } from "./case-log.js";
import { residualPanels } from "./residual-panels.js";
import { seededRun } from "./seeded-run.js";
import { presentFitIn } from "./show-fit.js";
import { shownTogether } from "./shown-together.js";

/**
 * Looks for what speaks against a fit; the result shows its residuals, the tests of them, how much each part of the
 * record decides, and how well refits of drawn records find the parameters again.
 *
 * The seed is the case's unless one is given.
 *
 * @example check(fit(crowding, counts, { errors: "observation" })).sentence;
 */
export function check(fit: Fit, options: CheckOptions = {}): Check {
  checkCall("check", arguments);
  const checked = seededRun("Checks", options, (own) => checkFit(fit, own));
  caseLog.noteStep(`checked "${ruleLabel(fit.rule)}": ${checked.sentence}`);
  return showing(presentFitIn(checked), () =>
    shownTogether([
      testsTable(checked),
      ...residualPanels(fit, checked.options.seed),
      ...(checked.groups.some(({ recovery }) => recovery) ? [recoveryTable(checked)] : []),
      ...(checked.groups.some(({ windows }) => windows.length > 0) ? [windowsTable(checked)] : []),
    ]),
  );
}

const groupColumn = (checked: EngineCheck): readonly { key: string; label: string; kind: "text" }[] =>
  checked.groups.length > 1 ? [{ key: "group", label: "Group", kind: "text" }] : [];

const stateColumn = (checked: EngineCheck): readonly { key: string; label: string; kind: "text" }[] =>
  checked.fit.rule.states.length > 1 ? [{ key: "state", label: "State", kind: "text" }] : [];

function testsTable(checked: EngineCheck): Table {
  return table({
    title: `Residuals of ${ruleLabel(checked.fit.rule)}`,
    columns: [
      ...groupColumn(checked),
      ...stateColumn(checked),
      { key: "question", label: "Question", kind: "text" },
      { key: "name", label: "Test", kind: "text" },
      { key: "statistic", label: "Value", kind: "number", digits: 3 },
      { key: "sentence", label: "Answer", kind: "text" },
    ],
    rows: checked.groups.flatMap((group) => [
      ...group.tests.map((test) => ({ group: group.group, ...test })),
      ...group.lackOfFit.map((test) => ({
        group: group.group,
        ...test,
        question: "Does the rule miss by more than replicates differ?",
        name: "Lack of fit",
        statistic: test.ratio,
      })),
    ]),
    notes: checked.groups.flatMap((group) => {
      const who = group.group === "" ? "" : `${group.group}: `;
      const errors =
        group.errors?.sentence ?? "The other kind of error could not be fitted, so none is advised.";
      return [`${who}${group.sentence}`, ...(group.sentence.includes(errors) ? [] : [`${who}${errors}`])];
    }),
  });
}

function recoveryTable(checked: EngineCheck): Table {
  const { resamples: refits, seed } = checked.options;
  const level = Math.round(100 * (checked.groups[0]?.recovery?.level ?? 0.95));
  const failed = checked.groups.reduce((sum, group) => sum + (group.recovery?.failed ?? 0), 0);
  return table({
    title: "Parameters found again in records drawn from the fit",
    columns: [
      ...groupColumn(checked),
      { key: "name", label: "Parameter", kind: "text" },
      { key: "truth", label: "Drawn with", kind: "estimate", pairedWith: "deviation" },
      { key: "bias", label: "Bias of refits", kind: "number", digits: 2 },
      { key: "medianBias", label: "Bias of their median", kind: "number", digits: 2 },
      { key: "deviation", label: "Standard deviation of refits", kind: "number", digits: 2 },
      {
        key: "coverage",
        label: `${level}% interval held the truth`,
        kind: "probability",
        pairedWith: "coverageError",
      },
    ],
    rows: checked.groups.flatMap((group) =>
      (group.recovery?.parameters ?? []).map((unknown) => ({ group: group.group, ...unknown })),
    ),
    notes: [
      `${refits} drawn records${checked.groups.length > 1 ? " a group" : ""}, seed ${seed}; held: a refit at the true value stays under the cut of the profile.`,
      ...(failed > 0 ? [`${failed} drawn records could not be refitted and are not counted.`] : []),
    ],
  });
}

function windowsTable(checked: EngineCheck): Table {
  const { axis } = checked.fit.observations;
  return table({
    title: "Estimates from parts of the record",
    columns: [
      ...groupColumn(checked),
      { key: "part", label: "Part", kind: "text" },
      periodColumn("from", `${axis.column}, from`, axis),
      periodColumn("to", "to", axis),
      { key: "name", label: "Parameter", kind: "text" },
      { key: "value", label: "Estimate", kind: "number", digits: 4 },
      { key: "shift", label: "Moved by standard errors", kind: "number", digits: 2 },
    ],
    rows: checked.groups.flatMap((group) =>
      group.windows.flatMap((window) =>
        window.estimates.map((estimate) => ({
          group: group.group,
          part: window.name,
          from: axis.counts === "numbers" ? window.from : window.periods[0],
          to: axis.counts === "numbers" ? window.to : window.periods[1],
          ...estimate,
          shift: estimate.shift ?? "not determined",
        })),
      ),
    ),
    limit: 60,
    notes: ["Moves are from the estimate of the whole record, in its standard errors."],
  });
}
