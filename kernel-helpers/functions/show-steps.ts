import {
  type ClosedForm,
  closedFormAt,
  type ExactTrajectory,
  type MatrixGrowth,
  type Trajectory,
} from "../../src/dynamics/index.js";
import { periodWords } from "../../src/record/index.js";
import type { Rule } from "../../src/rule/index.js";
import { type Figure, figure } from "../figures/index.js";
import { type Column, type Table, table } from "../tables/index.js";
import { acrossPeriods, periodCell, periodColumn } from "./across-periods.js";

const unitOf = (rule: Rule, name: string): string => rule.units[name] ?? "";
const number = { kind: "number", digits: 6 } as const;

/** A path: its figure, and its numbers with the quantities inside each period. */
export function showPath(run: Trajectory): readonly (Figure | Table)[] {
  const { rule, startsAt: from, axis } = run;
  const { every } = axis.step;
  const times = Array.from({ length: run.periods + 1 }, (_, t) =>
    axis.counts === "numbers" ? axis.origin + (from + t) * every : (from + t) * every,
  );
  const columns = { ...run.values, ...run.quantities };
  const names = [...rule.states, ...rule.quantities];
  const notes = [
    ...run.absorbed.map(
      ({ state, period, bound }) =>
        `${state} reaches its bound ${bound} at ${periodWords(axis, period)} and stays there.`,
    ),
    ...(run.stop.kind === "complete" ? [] : [run.stop.reason]),
  ];
  const numbers = table({
    title: "Periods",
    columns: [
      { ...periodColumn("period", "Period", axis), unit: "" },
      ...names.map((name): Column => ({ key: name, label: name, unit: unitOf(rule, name), ...number })),
    ],
    rows: times.map((time, t) => ({
      period: periodCell(axis, 0, time),
      ...Object.fromEntries(names.map((name) => [name, finite(columns[name]![t]!)])),
    })),
    limit: 30,
    notes,
  });
  const panels = rule.states.map((name) => ({
    title: rule.states.length > 1 ? name : "",
    x: axis.counts === "numbers" ? { title: "Period" } : acrossPeriods(axis, 0),
    y: { title: name, unit: unitOf(rule, name) },
    layers: [{ mark: "line", name, x: times, y: run.values[name]! } as const],
  }));
  return [figure({ title: "Path without random change", panels, notes }), numbers];
}

/** A quantity has no value in the first row. */
const finite = (value: number): number | undefined => (Number.isNaN(value) ? undefined : value);

/** A path in fractions, as text. */
export function showExactPath(run: ExactTrajectory): readonly Table[] {
  const { states } = run.rule;
  return [
    table({
      title: "Exact values",
      columns: [
        { key: "period", label: "Period", kind: "integer", grouped: false },
        ...states.map(
          (name): Column => ({ key: name, label: name, unit: unitOf(run.rule, name), kind: "text" }),
        ),
      ],
      rows: Array.from({ length: run.periods + 1 }, (_, period) => ({
        period,
        ...Object.fromEntries(states.map((name) => [name, run.values[name]![period]])),
      })),
      notes: ["Fractions are exact; decimals given were read as they print."],
    }),
  ];
}

function accountOf({ agreement, guaranteed }: ClosedForm): readonly string[] {
  const kept = guaranteed.throughout
    ? `all ${guaranteed.periods} periods looked at`
    : `period ${guaranteed.periods}`;
  return [
    `Formula and stepping differ by at most ${agreement.largest.toExponential(1)} of the value over ${agreement.periods} periods.`,
    `Stepping in computer numbers keeps ${guaranteed.digits} digits to ${kept}.`,
  ];
}

/** A closed form: formulas, first values, and the roots that it is made of. */
export function showClosedForm(form: ClosedForm): readonly Table[] {
  const { rule, formulas, roots } = form;
  const formulaTable = table({
    title: "After t periods",
    columns: [
      { key: "state", label: "State", kind: "text" },
      { key: "formula", label: "Formula", kind: "text" },
      { key: "ten", label: "At period 10", ...number },
    ],
    rows: rule.states.map((state) => ({
      state,
      formula: formulas[state],
      ten: closedFormAt(form, 10)[state],
    })),
    notes: accountOf(form),
  });
  return roots.length === 0 ? [formulaTable] : [formulaTable, rootTable(form)];
}

const rootTable = ({ roots }: ClosedForm): Table =>
  table({
    title: "Roots of the step",
    columns: [
      { key: "root", label: "Root", kind: "text" },
      { key: "modulus", label: "Size", ...number },
      { key: "times", label: "How often", kind: "integer" },
    ],
    rows: roots.map(({ re, im, modulus, times, exact }) => ({
      root:
        exact ??
        (im === 0
          ? re.toPrecision(10)
          : `${re.toPrecision(8)} ${im < 0 ? "-" : "+"} ${Math.abs(im).toPrecision(8)} i`),
      modulus,
      times,
    })),
  });

/** The long run of a matrix, state by state, and the elasticities. */
export function showMatrixGrowth(growth: MatrixGrowth): readonly Table[] {
  const { states, dominant, dampingRatio, firstPeriod } = growth;
  const long = table({
    title: "In the long run",
    columns: [
      { key: "state", label: "State", kind: "text" },
      { key: "share", label: "Share", kind: "percent", digits: 2 },
      { key: "worth", label: "Reproductive value", ...number },
    ],
    rows: states.map((state, i) => ({
      state,
      share: growth.structure[i],
      worth: growth.reproductiveValues[i],
    })),
    notes: [
      `The total is multiplied by ${Number(dominant.toPrecision(8))} a period. Damping ratio ${Number(dampingRatio.toPrecision(5))}.`,
      `In a single period the total may change by a factor from ${Number(firstPeriod.least.toPrecision(5))} to ${Number(firstPeriod.most.toPrecision(5))}, depending on the start.`,
    ],
  });
  const elasticities = table({
    title: "Elasticities of the multiplier",
    columns: [
      { key: "to", label: "To", kind: "text" },
      ...states.map((from): Column => ({ key: from, label: `from ${from}`, ...number, digits: 4 })),
    ],
    rows: states.map((to, i) => ({
      to,
      ...Object.fromEntries(states.map((from, j) => [from, growth.elasticities[i]![j]])),
    })),
    notes: ["They sum to 1."],
  });
  return [long, elasticities];
}
