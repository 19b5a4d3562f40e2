import type { RandomStream } from "../../numeric/index.js";
import type { FitRows } from "../rows/fit-rows.js";
import type { Lowest } from "../search/objective.js";
import type { Unknowns } from "../unknowns/unknowns.js";
import type { Search } from "./search.js";

/** Draws a record at the fit's estimates, or at other unknowns and another sigma. */
export type RecordDraw = (
  stream: RandomStream,
  other?: { readonly at: Float64Array; readonly sigma: number },
) => Float64Array | undefined;

/** A group's fit made ready to be done many times: to other values, to part of the record, with an unknown held. */
export interface Refitter {
  readonly unknowns: Unknowns;
  readonly rows: FitRows;
  /** Whether values far off the rule count for less. */
  readonly robust: boolean;
  /** [rows of the group, states]: the record. */
  readonly recorded: Float64Array;
  /** The fit's estimates, as the search holds them: variances where standard deviations are reported. */
  readonly at: Float64Array;
  /** An unknown as it is reported. */
  readonly reported: (i: number, value: number) => number;
  /** Puts other values [rows of the group, states] in the record's place. */
  readonly take: (values: Float64Array) => void;
  readonly minimise: (start: Float64Array) => Lowest;
  /** The same with unknown i held at a value. */
  readonly minimiseHeld: (start: Float64Array, i: number, value: number) => Lowest;
  /** Whether the profile interval that a refit gives unknown i holds a value: one refit held there tells. */
  readonly covers: (found: Lowest, i: number, value: number) => boolean;
  /** The least over compared values `from` to `end` - 1 only; absent where a fit cannot be taken apart. */
  readonly minimisePart?: (start: Float64Array, from: number, end: number) => Lowest;
  /**
   * A record drawn as the fit says that records come about, with the same periods and its own errors, and taken in the
   * record's place; undefined where the draw left the range of numbers. Absent where no record can be drawn: limits of
   * exact readings are not known beside censored ones, and a weighted count stands for no single draw.
   */
  readonly draw?: RecordDraw;
  /** The same with given errors on the fitting scale, [values compared]; of fits by least squares. */
  readonly disturb?: (errors: Float64Array) => Float64Array | undefined;
}

/** @param search - made for this refitter alone, since it is given other values. */
export function refitterOf(
  search: Search,
  recorded: Float64Array,
  at: Float64Array,
  sigma: number,
): Refitter {
  const { unknowns, rows, objective, cutAt, scale, part } = search;
  const { lower, upper } = unknowns;
  const states = recorded.length / search.group.index.length;
  const cells = rows.entries.map((entry, i) => entry * states + rows.states[i]!);
  const minimiseHeld = (start: Float64Array, i: number, value: number): Lowest => {
    const [low, high, from] = [lower.slice(), upper.slice(), start.slice()];
    for (const each of [low, high, from]) each[i] = value;
    return objective.minimise(from, low, high);
  };
  const take = (values: Float64Array): void => {
    rows.take(values);
    search.settle?.(at);
  };
  const taken = (values: Float64Array): Float64Array | undefined => {
    take(values);
    return cells.every((cell) => Number.isFinite(scale.to(values[cell]!))) ? values : undefined;
  };
  const { draw: drawn, disturbed } = search;
  return {
    unknowns,
    rows,
    robust: search.weightsAt !== undefined,
    recorded,
    at,
    reported: (i, value) => (unknowns.rooted[i] ? Math.sqrt(value) : value),
    take,
    minimise: (start) => objective.minimise(start, lower, upper),
    minimiseHeld,
    ...(part && {
      minimisePart: (start, from, end) => part(from, end).minimise(start, lower, upper),
    }),
    covers(found, i, value) {
      const { cut, variance } = cutAt(found.value);
      return minimiseHeld(found.estimates, i, value).value <= found.value + cut * variance;
    },
    ...(drawn && { draw: (stream, other) => taken(drawn(other?.at ?? at, other?.sigma ?? sigma, stream)) }),
    ...(disturbed && { disturb: (errors) => taken(disturbed(at, errors)) }),
  };
}
