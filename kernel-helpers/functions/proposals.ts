import {
  type Proposal as EngineProposal,
  type ProposeOptions,
  propose as tryCatalogue,
} from "../../src/evidence/index.js";
import type { Observations } from "../../src/record/index.js";
import { type RuleCatalogue, shortNames } from "../../src/rule/index.js";
import { type Figure, figure } from "../figures/index.js";
import { checkCall } from "../options/index.js";
import type { Proposal } from "../results/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { acrossGroup } from "./across-periods.js";
import { caseLog } from "./case-log.js";
import { seededRun } from "./seeded-run.js";
import { presentFit } from "./show-fit.js";
import { shownTogether } from "./shown-together.js";

/**
 * Tries the catalogue of rules on a record; the result shows which are supported, what they leave open, and why the
 * others are not. Its `fits` go on to `check`, `compare` and `forecast`.
 *
 * The seed is the case's unless one is given.
 *
 * @example propose(counts).verdict.kind;
 */
export function propose(observations: Observations, options: ProposeOptions = {}): Proposal {
  checkCall("propose", arguments);
  const proposal = seededRun("Rules of the catalogue", options, (own) => tryCatalogue(observations, own));
  caseLog.noteStep(`tried the catalogue: ${proposal.sentence}`);
  return showing(Object.assign(proposal, { fits: proposal.fits.map(presentFit) }), () =>
    shownTogether([
      proposalTable(proposal),
      proposal.fits.length > 0 ? supportedFigure(proposal) : undefined,
      leftOutTable(proposal),
    ]),
  );
}

function proposalTable(proposal: EngineProposal): Table {
  const unit = proposal.fits[0]?.observations.states[0]?.unit ?? "";
  return table({
    title: "Rules of the catalogue tried on this record",
    columns: [
      { key: "rule", label: "Rule", kind: "text" },
      { key: "call", label: "In the catalogue", kind: "text" },
      { key: "errors", label: "Error in the", kind: "text" },
      { key: "parameters", label: "Unknowns", kind: "integer" },
      { key: "difference", label: "AICc above the lowest", kind: "number", digits: 3 },
      { key: "heldOut", label: "Score on the last fifth, held out", kind: "number", digits: 3, unit },
      { key: "answer", label: "Answer", kind: "text" },
    ],
    rows: proposal.rows.map((row) => ({
      ...row,
      call: `rules.${row.name}`,
      heldOut: row.heldOut ?? "not forecast",
      answer: row.supported ? supportedText(row.undetermined) : row.reason,
    })),
    notes: [proposal.sentence, ...proposal.notes],
  });
}

function supportedText(undetermined: readonly string[]): string {
  return undetermined.length === 0 ? "supported" : `supported; does not determine ${undetermined.join(", ")}`;
}

function leftOutTable(proposal: EngineProposal): Table {
  return table({
    title: "Rules that were not tried",
    columns: [
      { key: "rule", label: "Rule", kind: "text" },
      { key: "call", label: "In the catalogue", kind: "text" },
      { key: "reason", label: "Because it", kind: "text" },
    ],
    rows: proposal.notTried.map(({ name, reason }) => ({
      rule: shortNames[name as keyof RuleCatalogue],
      call: `rules.${name}`,
      reason,
    })),
  });
}

function supportedFigure(proposal: EngineProposal): Figure {
  const { states, groups } = proposal.fits[0]!.observations;
  const [state] = states;
  const names = proposal.rows.filter((row) => row.supported);
  return figure({
    title: "The record and the rules it supports",
    panels: groups.map((group) => ({
      title: group.name,
      x: acrossGroup(group),
      y: { title: state!.column, unit: state!.unit },
      layers: [
        ...proposal.fits.map((fit, i) => {
          const points = fit.groups.find((each) => each.group === group.name)!.points;
          const kind = proposal.errors === "undecided" ? `, error in the ${names[i]!.errors}` : "";
          return {
            mark: "line",
            name: `${names[i]!.rule}${kind}`,
            x: points.map((point) => point.time),
            y: points.map((point) => point.fitted),
          } as const;
        }),
        { mark: "points", name: "recorded", x: group.time, y: Object.values(group.values)[0]! } as const,
      ],
    })),
    summary: proposal.sentence,
  });
}
