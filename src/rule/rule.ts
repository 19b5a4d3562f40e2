import type { Warning } from "../numeric/index.js";

/** A recurrence: text that was read, checked, and made ready to be run, differentiated and printed. */
export interface Rule {
  readonly kind: "rule";
  /** The text as given, normalised (NFC), comments kept. */
  readonly text: string;
  /** How the first state is stated: `X[t+1] = ...` or `ΔX = ...`. */
  readonly form: "next" | "change";
  readonly states: readonly string[];
  /** Named values inside the period, in event order. */
  readonly quantities: readonly string[];
  readonly inputs: readonly string[];
  /** Constants in order of first appearance. */
  readonly constants: readonly string[];
  /** By name; "" or absent = no unit stated. */
  readonly units: Readonly<Record<string, string>>;
  /** Lowest and highest admitted value by constant or state; infinite where open. */
  readonly bounds: Readonly<Record<string, readonly [number, number]>>;
  /** Starting values for a fit, by constant. */
  readonly guesses: Readonly<Record<string, number>>;
  /** Constants held at a value in every fit. */
  readonly fixed: Readonly<Record<string, number>>;
  readonly findings: readonly Warning[];
}
