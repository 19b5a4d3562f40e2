import { findRoot } from "../../numeric/index.js";
import { type Multiplier, multipliersOf } from "../rest/multiplier.js";
import { settleByNewton } from "../rest/settle-by-newton.js";
import { type HeldStep, settled } from "../setting/held-step.js";
import type { Bifurcation, Bifurcations } from "./bifurcations.js";

/** A rest level at one value of a parameter, with its leading multiplier. */
interface Level {
  readonly at: number;
  readonly present: Float64Array;
  readonly leading: Multiplier;
}

function levelAt(held: HeldStep, slot: number, at: number, near: Float64Array): Level | undefined {
  held.parameters[slot] = at;
  const present = settleByNewton(held, near);
  if (present === undefined) return undefined;
  const { matrix } = held.slopes(settled(held.rule, present));
  return { at, present, leading: multipliersOf(matrix, held.width)[0]! };
}

function kindOf({ re, im }: Multiplier): Bifurcation["kind"] {
  if (im !== 0) return "neimark-sacker";
  return re < 0 ? "flip" : "fold";
}

/** Where the leading multiplier has modulus 1 between two levels on either side of that. */
function crossing(held: HeldStep, slot: number, before: Level, after: Level): Bifurcation {
  const gap = (at: number): number =>
    (levelAt(held, slot, at, before.present)?.leading.modulus ?? Number.NaN) - 1;
  const at = findRoot(gap, before.at, after.at);
  const level = levelAt(held, slot, at, before.present) ?? after;
  return { at, kind: kindOf(level.leading), period: 1, points: [...level.present] };
}

/**
 * Follows a rest level of a system, or of a rule with lags, and finds where its leading multiplier passes modulus 1.
 */
export function followRestLevel(
  held: HeldStep,
  slot: number,
  range: { readonly from: number; readonly to: number },
  start: Float64Array,
  most: number,
): Pick<Bifurcations, "places" | "stop"> {
  const steps = 200;
  const places: Bifurcation[] = [];
  let here = levelAt(held, slot, range.from, start);
  for (let k = 1; k <= steps && here !== undefined; k++) {
    const next = levelAt(held, slot, range.from + ((range.to - range.from) * k) / steps, here.present);
    if (next !== undefined && here.leading.modulus < 1 !== next.leading.modulus < 1) {
      places.push(crossing(held, slot, here, next));
      if (places.length >= most) return { places, stop: "limit" };
    }
    here = next;
  }
  return { places, stop: here === undefined ? "no-cycle" : "range" };
}
