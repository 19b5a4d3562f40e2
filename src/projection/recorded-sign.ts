import type { Warning } from "../numeric/index.js";
import type { CentralPath } from "./central-path.js";
import type { FitGround } from "./fit-ground.js";

/** Where a path ahead, and in what words, is looked at. */
interface SignQuestion {
  readonly central: CentralPath;
  readonly ground: FitGround;
  /** "" for the only one. */
  readonly scenario: string;
  /** A row's period in words. */
  readonly period: (row: number) => string;
  /** Last row that matters; default the end. */
  readonly last?: number;
  /** Below zero by less than this is chance; default none. */
  readonly slack?: number;
}

/** A path below zero by less than this share of the largest record is rounding. */
const rounding = 1e-9;

/**
 * Warns of each state that the path ahead takes below zero though no record of it ever was, and no bound was stated. A
 * state whose bounds are stated, be they infinite, is left alone.
 */
export function recordedSignWarnings({
  central,
  ground,
  scenario,
  period,
  last,
  slack = 0,
}: SignQuestion): readonly Warning[] {
  const { rule, recorded, recordEnd, from } = ground;
  return rule.states.flatMap((state, s) => {
    const known = (recorded.values[state] ?? []).filter(Number.isFinite);
    if (rule.bounds[state] !== undefined || known.length === 0 || Math.min(...known) < 0) return [];
    const floor = -Math.max(slack, rounding * Math.max(...known));
    const values = central.values[s]!.slice(0, last === undefined ? undefined : last + 1);
    const first = values.findIndex((value, row) => row + from > recordEnd && value < floor);
    if (first < 0) return [];
    const row = values.reduce((low, value, at) => (at > low && value < values[low]! ? at : low), first);
    const under = scenario === "" ? "" : ` under "${scenario}"`;
    const message = `By ${period(row)} the rule gives ${state} = ${Number(values[row]!.toPrecision(4))}${under}: no record of it was ever below 0. Read nothing beyond ${period(first - 1)}; if ${state} ends at 0, give the rule the lower bound 0 for it.`;
    return [{ code: "leaves-recorded-sign", message }];
  });
}
