import { findRoot } from "../../numeric/index.js";
import type { Interval, StepEnclosure } from "../../rule/index.js";

/** Roots found by a search that can lose none. */
export interface EnclosedRoots {
  /** In rising order; one that the function touches without crossing counts once. */
  readonly roots: readonly number[];
  /** False when the search ran out of patience: there may be more. */
  readonly complete: boolean;
}

interface Problem {
  readonly of: (x: number) => number;
  /** Bounds on the function and its slope over an interval. */
  readonly enclose: (x: Interval) => StepEnclosure;
  readonly within: Interval;
}

const patience = 200_000;

const hasZero = ([low, high]: Interval): boolean => !(low > 0 || high < 0 || Number.isNaN(low));

/** Narrower intervals are not divided: the ends are as close as the function's own rounding allows. */
const narrow = ([low, high]: Interval): boolean =>
  high - low <= 1e-9 * Math.max(Math.abs(low), Math.abs(high), 1e-250);

/** Midpoint that halves small and large numbers alike, so that a wide range costs no more than its digits. */
function middleOf([low, high]: Interval): number {
  if (low < 0 && high > 0) return 0;
  const [near, far] = [Math.min(Math.abs(low), Math.abs(high)), Math.max(Math.abs(low), Math.abs(high))];
  const even = (low + high) / 2;
  if (far <= 4 * near) return even;
  return Math.sign(even) * (near === 0 ? far * 1e-3 : Math.sqrt(near) * Math.sqrt(far));
}

/** Bounds from the value in the middle and the slope: closer than direct ones on short pieces. */
function centered(enclose: Problem["enclose"], [low, high]: Interval, slope: Interval): Interval {
  const middle = low + (high - low) / 2;
  const reach = Math.max(high - middle, middle - low) * Math.max(Math.abs(slope[0]), Math.abs(slope[1]));
  const { value } = enclose([middle, middle]);
  const room = reach * (1 + 1e-12) + noise(middle);
  return Number.isFinite(room) && !Number.isNaN(value[0]) ? [value[0] - room, value[1] + room] : [-1, 1];
}

type Judgement = "empty" | "one-crossing" | "undecided" | "divide";

function judge({ of, enclose }: Problem, piece: Interval): Judgement {
  const { value, slope } = enclose(piece);
  if (!hasZero(value) || !hasZero(centered(enclose, piece, slope))) return "empty";
  if (Number.isNaN(slope[0]) || hasZero(slope)) return narrow(piece) ? "undecided" : "divide";
  return Math.sign(of(piece[0])) * Math.sign(of(piece[1])) <= 0 ? "one-crossing" : "empty";
}

interface Division {
  /** Pieces where the function crosses zero once. */
  readonly crossings: Interval[];
  /** Narrow pieces that could not be decided. */
  readonly undecided: Interval[];
  readonly complete: boolean;
}

function divide(problem: Problem): Division {
  const { within } = problem;
  const crossings: Interval[] = [];
  const undecided: Interval[] = [];
  const pending: Interval[] = [within];
  for (let looked = 0; pending.length > 0; looked++) {
    if (looked > patience) return { crossings, undecided, complete: false };
    const piece = pending.pop()!;
    const judgement = judge(problem, piece);
    if (judgement === "one-crossing") crossings.push(piece);
    if (judgement === "undecided") undecided.push(piece);
    if (judgement !== "divide") continue;
    const middle = middleOf(piece);
    pending.push([middle, piece[1]], [piece[0], middle]);
  }
  return { crossings, undecided, complete: true };
}

const noise = (x: number): number => 64 * Number.EPSILON * Math.max(Math.abs(x), 1e-300);

/** Joins pieces that touch, and pieces between which the function is zero to rounding. */
function joined(of: (x: number) => number, pieces: readonly Interval[]): readonly Interval[] {
  const flat = (low: number, high: number): boolean =>
    [0, 1, 2, 3, 4, 5, 6, 7, 8].every((i) => {
      const x = low + ((high - low) * i) / 8;
      return Math.abs(of(x)) <= noise(x);
    });
  const out: Interval[] = [];
  for (const piece of [...pieces].sort((a, b) => a[0] - b[0])) {
    const last = out.at(-1);
    if (last === undefined || (piece[0] > last[1] && !flat(last[1], piece[0]))) out.push(piece);
    else out[out.length - 1] = [last[0], Math.max(last[1], piece[1])];
  }
  return out;
}

/** Where a function is level near a narrow piece: there it touches zero, if it does. */
function levelPlace({ enclose }: Problem, [low, high]: Interval): number {
  const slopeAt = (x: number): number => {
    const { slope } = enclose([x, x]);
    return (slope[0] + slope[1]) / 2;
  };
  const room = 2 * (high - low) + 1e-9 * Math.max(Math.abs(low), Math.abs(high));
  const [from, to] = [low - room, high + room];
  return slopeAt(from) * slopeAt(to) < 0 ? findRoot(slopeAt, from, to) : (low + high) / 2;
}

/** Settles a narrow piece that bounds could not decide. */
function decide(problem: Problem, piece: Interval): number | undefined {
  const { of } = problem;
  const [low, high] = piece;
  if (Math.sign(of(low)) * Math.sign(of(high)) < 0) {
    const at = findRoot(of, low, high);
    // A jump changes sign too, without passing zero.
    return Math.abs(of(at)) <= 1e-6 * Math.abs(at) ? at : undefined;
  }
  // A jump may land on zero without a change of sign; jumps mostly stand at numbers that print short.
  const places = [levelPlace(problem, piece), Number(((low + high) / 2).toPrecision(9)), low, high];
  return places.find((at) => Math.abs(of(at)) <= noise(at));
}

function rootIn(of: (x: number) => number, [low, high]: Interval): number {
  if (of(low) === 0) return low;
  return of(high) === 0 ? high : findRoot(of, low, high);
}

/**
 * Every root of a function in a range. Intervals on which bounds show that there is none are dropped; where the
 * slope keeps its sign there is one at most, found by Brent's method; the rest is divided.
 *
 * @see Moore, Kearfott and Cloud (2009), Introduction to Interval Analysis, chapter 8.
 */
export function enclosedRoots(problem: Problem): EnclosedRoots {
  const { of } = problem;
  const { crossings, undecided, complete } = divide(problem);
  const places = crossings.map((piece): Interval => {
    const at = rootIn(of, piece);
    return [at, at];
  });
  const roots = joined(of, [...places, ...undecided]).flatMap((piece) => {
    if (places.some((place) => place[0] === piece[0] && place[1] === piece[1])) {
      return [piece[0]];
    }
    return decide(problem, piece) ?? [];
  });
  return { roots, complete };
}
