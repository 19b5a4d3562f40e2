import type { Warning } from "../numeric/index.js";
import { type Rule, type StateBound, withinBound } from "../rule/index.js";
import type { CentralPath } from "./central-path.js";
import type { BoundsPassed } from "./first-passage.js";

/** What is said of the bounds of states is read from this. */
interface RangeSource {
  readonly rule: Rule;
  readonly central: CentralPath;
  /** A row's period in words: "year 2030". */
  readonly period: (row: number) => string;
  /** Share of paths that have ended. */
  readonly left: number;
  readonly paths: number;
  /** By state. */
  readonly bounds: readonly StateBound[];
  /** By state. */
  readonly passed: readonly BoundsPassed[];
}

/** What a reader must know where paths come to the bounds of a state: those that stay there, and those that end. */
export function rangeWarnings(source: RangeSource): Warning[] {
  const { central, period, left, paths } = source;
  const found: Warning[] = absorptions(source);
  const { stop } = central;
  if (stop !== undefined)
    found.push({
      code: "path-leaves-range",
      message: `At ${period(stop.row)} the rule gives ${stop.state} = ${Number(stop.value.toPrecision(4))}, outside its range; the path without random change stops at ${period(Math.max(0, stop.row - 1))}.`,
    });
  if (left > 0 && paths > 1)
    found.push({
      code: "paths-leave-range",
      message: `${shareWords(left, paths)} of the paths leave the range of a state before the end; the bands are those of the others.`,
    });
  return found;
}

/** By state: the path without random change that stays at a bound, or the share of paths that do. */
function absorptions({ rule, central, period, paths, bounds, passed }: RangeSource): Warning[] {
  return rule.states.flatMap((state, s): Warning[] => {
    const own = central.absorbed.find((each) => each.state === state);
    if (paths === 1 && own !== undefined)
      return [
        {
          code: "path-absorbed",
          message: `${state} reaches its bound ${own.bound} at ${period(own.row)} and stays there.`,
        },
      ];
    const kept = Float64Array.from(passed[s]!.value, (value, path) =>
      passed[s]!.row[path]! < 0 ? Number.NaN : withinBound(bounds[s]!, value),
    ).filter(Number.isFinite);
    if (paths === 1 || kept.length === 0) return [];
    const named = [...new Set(kept)].sort((a, b) => a - b).join(" or ");
    return [
      {
        code: "paths-absorbed",
        message: `${shareWords(kept.length / paths, paths)} of the paths reach the bound ${named} of ${state} before the end and stay there; they are counted at the bound.`,
      },
    ];
  });
}

/** "12% (Monte-Carlo error 0.7%)". */
function shareWords(share: number, paths: number): string {
  const error = Math.sqrt((share * (1 - share)) / paths);
  const words = `${Number((100 * share).toPrecision(2))}%`;
  return error === 0 ? words : `${words} (Monte-Carlo error ${Number((100 * error).toPrecision(1))}%)`;
}
