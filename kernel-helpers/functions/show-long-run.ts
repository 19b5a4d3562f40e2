import type {
  Basins,
  Bifurcations,
  Cobweb,
  Cycles,
  Equilibria,
  LyapunovExponent,
  PredictionHorizon,
} from "../../src/dynamics/index.js";
import type { Rule } from "../../src/rule/index.js";
import { cobwebFigure, type Figure, figure } from "../figures/index.js";
import { type Column, type Table, table } from "../tables/index.js";

const unitOf = (rule: Rule, name: string): string => rule.units[name] ?? "";
const number = { kind: "number", digits: 6 } as const;
const verdictColumns: readonly Column[] = [
  { key: "size", label: "Size of the multiplier", ...number },
  { key: "verdict", label: "Verdict", kind: "text" },
  { key: "approach", label: "Gaps move", kind: "text" },
  { key: "boundary", label: "Boundary", kind: "text" },
];

const searched = {
  "all-values": "Every value stays as it is.",
  every: "None in the range searched can be missing.",
  "many-starts": "Found from many starts; for a system this does not prove that there is no other.",
  "cut-short": "The search was cut short; there may be more. Narrow the range.",
} as const;

/** Rest levels with their verdicts. */
export function showEquilibria(found: Equilibria): readonly Table[] {
  const { rule, points } = found;
  const ranges = rule.states.map(
    (state) => `${state} from ${found.range[state]![0]} to ${found.range[state]![1]}`,
  );
  return [
    table({
      title: points.length === 0 ? "No rest level in the range" : "Rest levels",
      columns: [
        ...rule.states.map(
          (state): Column => ({ key: state, label: state, unit: unitOf(rule, state), ...number, digits: 8 }),
        ),
        ...verdictColumns,
      ],
      rows: points.map((point) => ({ ...point, ...point.at, size: point.multipliers[0]!.modulus })),
      notes: [
        ...points.map(({ sentence }) => sentence),
        `Searched: ${ranges.join(", ")}. ${searched[found.search]}`,
      ],
    }),
  ];
}

/** Cycles of one period with their verdicts. */
export function showCycles(found: Cycles): readonly Table[] {
  return [
    table({
      title: `Cycles of period ${found.period}: ${found.cycles.length}`,
      columns: [{ key: "values", label: "Values in turn", kind: "text" }, ...verdictColumns],
      rows: found.cycles.map((cycle) => ({
        ...cycle,
        values: cycle.points.map((x) => Number(x.toPrecision(7))).join(", "),
        size: cycle.multiplier.modulus,
      })),
      notes: [`Searched from ${found.range[0]} to ${found.range[1]}. ${searched[found.search]}`],
    }),
  ];
}

const losses = {
  flip: "flip: the period doubles",
  fold: "fold: it meets an unstable one and vanishes",
  transcritical: "transcritical: it exchanges stability with another one, and both go on",
  pitchfork: "pitchfork: it goes on unstable, and two stable ones leave it",
  "neimark-sacker": "Neimark-Sacker: turning motion takes over",
} as const;

/** Places at which what is stable changes. */
export function showBifurcations(found: Bifurcations): readonly Table[] {
  const ends = {
    range: "The range was followed to its end.",
    limit: "As many places as asked for were found.",
    "no-cycle":
      "Beyond the last place no stable cycle of period up to 128, or no rest level, was left to follow.",
  } as const;
  return [
    table({
      title: `Where the stable cycle changes as ${found.vary} varies`,
      columns: [
        { key: "at", label: found.vary, unit: unitOf(found.rule, found.vary), ...number, digits: 10 },
        { key: "kind", label: "Kind", kind: "text" },
        { key: "period", label: "Period left", kind: "integer" },
      ],
      rows: found.places.map((place) => ({
        ...place,
        kind: losses[place.kind],
      })),
      notes: [ends[found.stop]],
    }),
  ];
}

/** The exponent, and its running mean. */
export function showExponent(found: LyapunovExponent): readonly (Figure | Table)[] {
  const size = found.periods / found.settling.length;
  return [
    table({
      title: "Growth of small gaps",
      columns: [
        { key: "value", label: "Exponent", unit: "per period", ...number },
        { key: "lower", label: `Interval ${100 * found.level}%, from`, ...number },
        { key: "upper", label: "to", ...number },
        { key: "verdict", label: "Verdict", kind: "text" },
        { key: "periods", label: "Periods", kind: "integer" },
      ],
      rows: [{ ...found, lower: found.interval[0], upper: found.interval[1] }],
      notes: [found.sentence],
    }),
    figure({
      title: "How the exponent settled",
      x: { title: "Periods measured" },
      y: { title: "Mean so far", unit: "per period" },
      layers: [
        {
          mark: "line",
          name: "exponent",
          x: Array.from(found.settling, (_, i) => (i + 1) * size),
          y: found.settling,
        },
        { mark: "threshold", name: "no growth", y: 0 },
      ],
    }),
  ];
}

/** How far ahead, in one line. */
export function showHorizon(found: PredictionHorizon): readonly (Figure | Table)[] {
  return [
    table({
      title: "Horizon of single values",
      columns: [
        { key: "periods", label: "Periods", ...number, digits: 3 },
        { key: "lower", label: "From", ...number, digits: 3 },
        { key: "upper", label: "to", ...number, digits: 3 },
      ],
      rows: [
        { periods: open(found.periods), lower: open(found.interval[0]), upper: open(found.interval[1]) },
      ],
      notes: [found.sentence],
    }),
    ...showExponent(found.lyapunovExponent),
  ];
}

const open = (value: number): number | string => (Number.isFinite(value) ? value : "no end");

/** The web, and the second iterate beside the rule. */
export function showCobweb(found: Cobweb): readonly Figure[] {
  const { rule, state } = found;
  const axis = { title: state, unit: unitOf(rule, state) };
  const path = Array.from({ length: (found.web.x.length + 1) / 2 }, (_, i) => found.web.x[2 * i]!);
  return [
    cobwebFigure({
      title: "Next value against present value",
      state: axis,
      rule: { name: "the rule", present: found.present, next: found.next },
      trajectory: path,
      equilibria: found.equilibria.map(({ at, verdict }) => ({
        value: at[state]!,
        stable: verdict === "undetermined" ? "undetermined" : verdict === "stable",
      })),
    }),
    figure({
      title: "Value two periods on against present value",
      x: { ...axis, title: `${state}, present` },
      y: { ...axis, title: `${state}, two periods on` },
      layers: [
        { mark: "line", name: "no change", x: found.present, y: found.present, dashed: true },
        { mark: "line", name: "the rule twice", x: found.present, y: found.secondNext },
      ],
    }),
  ];
}

/** Where starts end up. */
export function showBasins(found: Basins): readonly Table[] {
  const known = found.basins.some(({ probability }) => probability !== undefined);
  return [
    table({
      title: "Where first values end up",
      columns: [
        { key: "where", label: "Long-run values", kind: "text" },
        { key: "from", label: "First values", kind: "text" },
        ...(known ? [{ key: "probability", label: "Probability", kind: "probability" } as const] : []),
      ],
      rows: found.basins.map(({ attractor, from, probability }) => ({
        where:
          attractor.length === 0
            ? "without bound"
            : attractor.map((x) => Number(x.toPrecision(6))).join(", "),
        from: from
          .map(([low, high]) => `${Number(low.toPrecision(8))} to ${Number(high.toPrecision(8))}`)
          .join("; "),
        probability,
      })),
      notes:
        found.borders.length === 0
          ? []
          : [`Borders: ${found.borders.map((x) => Number(x.toPrecision(10))).join(", ")}.`],
    }),
  ];
}
