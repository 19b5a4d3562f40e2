import { type Fit, type GroupFit, problemOf } from "../../src/estimate/index.js";
import { normalQuantile, randomStream } from "../../src/numeric/index.js";
import { ruleLabel } from "../../src/rule/index.js";
import { type Figure, figure, type Panel } from "../figures/index.js";
import { acrossRecord } from "./across-periods.js";

type Point = GroupFit["points"][number];

/**
 * The residuals that are tested looked at four ways, a figure for each state: against the period, against the fitted
 * value, each against the one before, and in order against a normal sample.
 *
 * @param seed - of randomised quantile residuals.
 */
export function residualPanels(fit: Fit, seed: number): readonly Figure[] {
  const several = fit.rule.states.length > 1;
  const tested = fit.groups.map((group) => {
    const problem = problemOf(fit).group(group.group);
    const residuals = problem.residuals(problem.tested, randomStream(seed));
    return group.points.map((point, i) => ({ ...point, residual: residuals[i]! }));
  });
  return fit.rule.states.map((state) => {
    const groups = fit.groups.map((group, g) => ({
      name: group.group === "" ? "residual" : group.group,
      points: tested[g]!.filter((point) => point.state === state && Number.isFinite(point.residual)),
    }));
    return figure({
      title: `Residuals of ${ruleLabel(fit.rule)}${several ? `, ${state}` : ""}`,
      panels: panelsOf(fit, state, groups),
      summary:
        "Without pattern in the first three panels and on the line in the fourth where the rule and its errors are right.",
    });
  });
}

interface Series {
  readonly name: string;
  readonly points: readonly Point[];
}

function panelsOf(fit: Fit, state: string, groups: readonly Series[]): Panel[] {
  const { states } = fit.observations;
  const unit = states.find((each) => each.name === state)?.unit ?? "";
  const residual = residualAxis(fit, unit);
  const before = groups.map(({ name, points }) => ({ name, pairs: neighbours(points) }));
  const zero = { mark: "threshold", name: "zero", y: 0, inLegend: false } as const;
  const points = (
    name: string,
    style: number,
    x: readonly number[],
    y: readonly number[],
  ): Panel["layers"][number] => ({
    mark: "points",
    name,
    style,
    x,
    y,
  });
  return [
    {
      title: "By period",
      x: acrossRecord(fit.observations),
      y: residual,
      layers: [
        zero,
        ...groups.map((g, i) =>
          points(
            g.name,
            i,
            g.points.map((p) => p.time),
            residuals(g),
          ),
        ),
      ],
    },
    {
      title: "By fitted value",
      x: { title: `Fitted ${state}`, unit },
      y: residual,
      layers: [
        zero,
        ...groups.map((g, i) =>
          points(
            g.name,
            i,
            g.points.map((p) => p.fitted),
            residuals(g),
          ),
        ),
      ],
    },
    {
      title: "By the residual before",
      x: { ...residual, title: `${residual.title}, period before` },
      y: residual,
      layers: [
        zero,
        ...before.map((g, i) =>
          points(
            g.name,
            i,
            g.pairs.map(([x]) => x),
            g.pairs.map(([, y]) => y),
          ),
        ),
      ],
    },
    {
      title: "Against a normal sample",
      x: { title: "Expected of a normal sample", unit: "standard deviations" },
      y: residual,
      layers: groups.flatMap((g, i) => normalLayers(g, i, points)),
    },
  ];
}

/** What the residuals are called, and their unit. */
function residualAxis(fit: Fit, unit: string): { readonly title: string; readonly unit: string } {
  const { kind, scale } = problemOf(fit);
  if (kind === "likelihood") return { title: "Quantile residual", unit: "standard deviations" };
  if (kind === "state-space") return { title: "Prediction error", unit: "standard deviations" };
  return scale.log ? { title: "Residual of the logarithm", unit: "" } : { title: "Residual", unit };
}

const residuals = (group: Series): number[] => group.points.map((point) => point.residual);

/** Pairs of residuals one step apart. */
function neighbours(points: readonly Point[]): (readonly [number, number])[] {
  return points.flatMap((point, i) => {
    const last = points[i - 1];
    return last !== undefined && point.index === last.index + 1
      ? [[last.residual, point.residual] as const]
      : [];
  });
}

function normalLayers(
  group: Series,
  style: number,
  points: (
    name: string,
    style: number,
    x: readonly number[],
    y: readonly number[],
  ) => Panel["layers"][number],
): Panel["layers"] {
  const sorted = residuals(group).sort((a, b) => a - b);
  const count = sorted.length;
  // Expected order statistics by Blom (1958): probabilities (i - 3/8)/(n + 1/4).
  const expected = sorted.map((_, i) => normalQuantile((i + 1 - 0.375) / (count + 0.25)));
  const mean = sorted.reduce((sum, value) => sum + value, 0) / count;
  const deviation = Math.sqrt(sorted.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (count - 1));
  const ends = [expected[0]!, expected[count - 1]!];
  const line = ends.map((z) => mean + deviation * z);
  return [
    { mark: "line", name: "normal", style, x: ends, y: line, dashed: true, inLegend: false },
    points(group.name, style, expected, sorted),
  ];
}
