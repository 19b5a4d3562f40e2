import type { Multiplier } from "./multiplier.js";

/** What a small push away does in the long run. */
export interface Stability {
  readonly verdict: "stable" | "unstable" | "undetermined";
  /** How a gap moves from period to period. */
  readonly approach: "one-sided" | "alternating" | "turning";
  /** Named where a multiplier lies on the boundary: at +1, at -1, or a complex pair of modulus 1. */
  readonly boundary: "fold" | "flip" | "neimark-sacker" | "none";
  /** The verdict as a clause: "is stable: ...". */
  readonly words: string;
}

/** A modulus this close to 1 is not told apart from 1: the linear part does not decide. */
const closeness = 1e-7;

const shown = (value: number): string => String(Number(value.toPrecision(4)));

function boundaryOf(first: Multiplier): Stability["boundary"] {
  if (Math.abs(first.modulus - 1) > closeness) return "none";
  if (first.im !== 0) return "neimark-sacker";
  return first.re > 0 ? "fold" : "flip";
}

const manners: Readonly<Record<Stability["approach"], string>> = {
  "one-sided": "on one side",
  alternating: "from side to side",
  turning: "in turns",
};

/** Judges an equilibrium or a cycle by its multipliers, largest modulus first. */
export function stabilityOf(multipliers: readonly Multiplier[]): Stability {
  const first = multipliers[0]!;
  const approach = first.im !== 0 ? "turning" : first.re < 0 ? "alternating" : "one-sided";
  const boundary = boundaryOf(first);
  const size = shown(first.modulus);
  if (boundary !== "none" || Number.isNaN(first.modulus)) {
    const words = `is on the boundary between stable and unstable (multiplier of size ${size}): the linear part does not decide`;
    return { verdict: "undetermined", approach, boundary, words };
  }
  const verdict = first.modulus < 1 ? "stable" : "unstable";
  const moves = verdict === "stable" ? "shrinks" : "grows";
  const words = `is ${verdict}: a small gap ${moves} to ${size} of itself each time, ${manners[approach]}`;
  return { verdict, approach, boundary, words };
}
