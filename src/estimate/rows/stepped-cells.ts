import type { RecordedPairs } from "./recorded-pairs.js";

/** The recorded values at the ends of pairs, in the order of their rows. All arrays have one entry a value. */
export interface SteppedCells {
  /** Row of the group, and number of the state. */
  readonly entries: Int32Array;
  readonly states: Int32Array;
  /** Steps from where its pair begins. */
  readonly spans: Int32Array;
  /** The first pair that begins where its own does: values with the same one are reached from the same row. */
  readonly origins: Int32Array;
  /** The first of the values reached from the same row, and the most steps to one of them. */
  readonly firsts: Int32Array;
  readonly reaches: Int32Array;
  /** Steps of the longest pair. */
  readonly longest: number;
}

export function steppedCells(
  { from, to, spans }: RecordedPairs,
  states: number,
  values: Float64Array,
): SteppedCells {
  const cells = Array.from({ length: to.length * states }, (_, k) => ({
    pair: Math.floor(k / states),
    state: k % states,
  })).filter(({ pair, state }) => !Number.isNaN(values[to[pair]! * states + state]!));
  const origins = Int32Array.from(cells, ({ pair }) => from.indexOf(from[pair]!));
  const last = new Map<number, number>();
  const first = new Map<number, number>();
  cells.forEach(({ pair }, i) => {
    const origin = origins[i]!;
    if (!first.has(origin)) first.set(origin, i);
    last.set(origin, spans[pair]!);
  });
  return {
    entries: Int32Array.from(cells, ({ pair }) => to[pair]!),
    states: Int32Array.from(cells, ({ state }) => state),
    spans: Int32Array.from(cells, ({ pair }) => spans[pair]!),
    origins,
    firsts: origins.map((origin) => first.get(origin)!),
    reaches: origins.map((origin) => last.get(origin)!),
    longest: spans.reduce((most, span) => Math.max(most, span), 1),
  };
}
