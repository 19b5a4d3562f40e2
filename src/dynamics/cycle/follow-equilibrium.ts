import { SVD } from "ml-matrix";
import { findRoot } from "../../numeric/index.js";
import { type Multiplier, multipliersOf } from "../rest/multiplier.js";
import { linearisedGap, settleByNewton } from "../rest/settle-by-newton.js";
import { type HeldStep, settled } from "../setting/held-step.js";
import type { Bifurcation, Bifurcations } from "./bifurcations.js";

/** An equilibrium at one value of a parameter, with its leading multiplier. */
interface Level {
  readonly at: number;
  readonly present: Float64Array;
  readonly leading: Multiplier;
}

function leadingAt(held: HeldStep, present: Float64Array): Multiplier {
  const { matrix } = held.slopes(settled(held.rule, present));
  return multipliersOf(matrix, held.width)[0]!;
}

function levelAt(held: HeldStep, slot: number, at: number, near: Float64Array): Level | undefined {
  held.parameters[slot] = at;
  const present = settleByNewton(held, near);
  return present && { at, present, leading: leadingAt(held, present) };
}

const largest = (values: Float64Array, least: number): number =>
  values.reduce((most, value) => Math.max(most, Math.abs(value)), least);

const farthest = (a: Float64Array, b: Float64Array): number =>
  a.reduce((most, value, i) => Math.max(most, Math.abs(value - b[i]!)), 0);

/**
 * The equilibrium that a level goes on to, `change` being how it changes with the parameter; undefined where what is
 * found lies off its way and does not lead back to it, so that it is another one.
 */
function continued(
  held: HeldStep,
  slot: number,
  from: Level,
  at: number,
  change?: Float64Array,
): Level | undefined {
  const expected = from.present.map((value, i) => value + (change?.[i] ?? 0) * (at - from.at));
  const next = levelAt(held, slot, at, expected);
  if (next === undefined) return undefined;
  if (farthest(next.present, expected) <= 0.25 * farthest(expected, from.present)) return next;
  const back = levelAt(held, slot, from.at, next.present);
  held.parameters[slot] = at;
  return back && farthest(back.present, from.present) <= 1e-6 * largest(from.present, 0) ? next : undefined;
}

/**
 * What the equilibrium meets where its multiplier is 1 and it goes on: along the direction that does not shrink the
 * leading multiplier changes in the first order where another equilibrium crosses, in the second where two leave.
 */
function meets(held: HeldStep, present: Float64Array, scale: number): Bifurcation["kind"] {
  const { slopes } = linearisedGap(held, present);
  const right = new SVD(slopes).rightSingularVectors;
  const direction = right.getColumn(right.columns - 1);
  const at = (part: number): number =>
    leadingAt(
      held,
      present.map((value, i) => value + part * scale * direction[i]!),
    ).re;
  const [above, below, here] = [at(1e-3), at(-1e-3), at(0)];
  return Math.abs(above - below) > Math.abs(above + below - 2 * here) ? "transcritical" : "pitchfork";
}

function kindOf(held: HeldStep, { present, leading: { re, im } }: Level, scale: number): Bifurcation["kind"] {
  if (im !== 0) return "neimark-sacker";
  return re < 0 ? "flip" : meets(held, present, scale);
}

/** Where the leading multiplier has modulus 1 between two levels on either side of that. */
function crossing(held: HeldStep, slot: number, before: Level, after: Level, scale: number): Bifurcation {
  const span = after.at - before.at;
  const near = (at: number): Float64Array =>
    before.present.map((value, i) => value + ((at - before.at) / span) * (after.present[i]! - value));
  const gap = (at: number): number => (levelAt(held, slot, at, near(at))?.leading.modulus ?? Number.NaN) - 1;
  const at = findRoot(gap, before.at, after.at);
  const level = levelAt(held, slot, at, near(at)) ?? after;
  const { re, im } = level.leading;
  const place = im === 0 && re > 0 ? crossed(held, slot, at, span, near) : level;
  held.parameters[slot] = place.at;
  return { at: place.at, kind: kindOf(held, place, scale), period: 1, points: [...place.present] };
}

/**
 * The level at which equilibria cross. Close by, Newton's method may end in either of them, so multiplier and values
 * are interpolated from levels that lie apart, about the place guessed.
 */
function crossed(
  held: HeldStep,
  slot: number,
  guess: number,
  span: number,
  near: (at: number) => Float64Array,
): Level {
  const levels = [-1, -0.75, -0.5, -0.25, 0.25, 0.5, 0.75, 1].flatMap((part) => {
    const at = guess + part * span;
    return levelAt(held, slot, at, near(at)) ?? [];
  });
  const value = (read: (level: Level) => number, at: number): number => interpolated(levels, read, at);
  const gap = (at: number): number => value(({ leading }) => leading.re - 1, at);
  const at = gap(guess - span) * gap(guess + span) < 0 ? findRoot(gap, guess - span, guess + span) : guess;
  const present = near(guess).map((_, i) => value((level) => level.present[i]!, at));
  return { at, present, leading: { re: 1, im: 0, modulus: 1 } };
}

/** The polynomial through values of the levels, by Neville's scheme. */
function interpolated(levels: readonly Level[], read: (level: Level) => number, at: number): number {
  const row = levels.map(read);
  for (let k = 1; k < levels.length; k++) {
    for (let i = 0; i < levels.length - k; i++) {
      const [low, high] = [levels[i]!.at, levels[i + k]!.at];
      row[i] = ((at - high) * row[i]! + (low - at) * row[i + 1]!) / (low - high);
    }
  }
  return row[0]!;
}

/** Where an equilibrium vanishes between a value at which it is there and one at which it is not: at a fold. */
function vanishing(held: HeldStep, slot: number, from: Level, gone: number): Bifurcation | undefined {
  let [here, beyond] = [from, gone];
  for (let k = 0; k < 60; k++) {
    const at = (here.at + beyond) / 2;
    const next = continued(held, slot, here, at);
    if (next === undefined) beyond = at;
    else here = next;
  }
  const { re, im } = here.leading;
  if (im !== 0 || Math.abs(re - 1) > 1e-2) return undefined;
  return { at: here.at, kind: "fold", period: 1, points: [...here.present] };
}

/**
 * Follows an equilibrium of a system, or of a rule with lags, and finds where its leading multiplier passes modulus 1,
 * or where it vanishes.
 */
export function followEquilibrium(
  held: HeldStep,
  slot: number,
  range: { readonly from: number; readonly to: number },
  start: Float64Array,
  most: number,
): Pick<Bifurcations, "places" | "stop"> {
  const step = (range.to - range.from) / 200;
  const places: Bifurcation[] = [];
  let here = levelAt(held, slot, range.from, start);
  let change: Float64Array | undefined;
  /** Typical size of the state: the largest value met on the way. */
  let scale = largest(here?.present ?? start, 0) || largest(held.parameters, 0) || 1;
  while (here !== undefined && (range.to - here.at) / step > 1e-9) {
    const from: Level = here;
    const reach = Math.min(1, (range.to - from.at) / step) * step;
    // Where equilibria cross none can be told from the other: the next step then falls short of that or goes past it.
    const parts = [1, 0.63, 1.37];
    const next = parts.reduce<Level | undefined>(
      (found, part) => found ?? continued(held, slot, from, from.at + part * reach, change),
      undefined,
    );
    scale = largest(from.present, scale);
    const place =
      next === undefined
        ? vanishing(held, slot, from, from.at + reach)
        : passage(held, slot, from, next, scale);
    if (place !== undefined) places.push(place);
    if (places.length >= most) return { places, stop: "limit" };
    change = next?.present.map((value, i) => (value - from.present[i]!) / (next.at - from.at));
    here = next;
  }
  return { places, stop: here === undefined ? "no-cycle" : "range" };
}

/** The place between two levels at which stability is lost or won, if it is. */
function passage(
  held: HeldStep,
  slot: number,
  from: Level,
  next: Level,
  scale: number,
): Bifurcation | undefined {
  const same = from.leading.modulus < 1 === next.leading.modulus < 1;
  return same ? undefined : crossing(held, slot, from, next, scale);
}
