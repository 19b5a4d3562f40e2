import type { Places } from "./layer.js";

/** One recorded series. */
export interface RecordedSeries {
  readonly name: string;
  readonly x: Places;
  readonly y: ArrayLike<number>;
}

/** A line to draw over a record: a trajectory or a curve. */
export interface LineSeries {
  readonly name: string;
  readonly x: Places;
  readonly y: ArrayLike<number>;
}

/** Style of recorded values in every figure. */
export const recordedStyle = 1;

/** Styles of rules in order; none is that of recorded values. */
export function ruleStyle(turn: number): number {
  return turn === 0 ? 0 : turn + 1;
}

/**
 * A series with NaN inserted wherever its step is longer than usual, so that no line is drawn across a gap. Series with
 * names or dates are returned unchanged.
 */
export function breakAtGaps({ name, x, y }: RecordedSeries): RecordedSeries {
  const at = Array.from({ length: x.length }, (_, i) => x[i]);
  if (!at.every((place): place is number => typeof place === "number")) return { name, x, y };
  const steps = at.slice(1).map((place, i) => place - (at[i] as number));
  const usual = [...steps].sort((a, b) => a - b)[Math.floor(steps.length / 2)] ?? 0;
  const placesOut: number[] = [];
  const valuesOut: number[] = [];
  at.forEach((place, i) => {
    if (i > 0 && (steps[i - 1] as number) > 1.5 * usual) {
      placesOut.push(place);
      valuesOut.push(Number.NaN);
    }
    placesOut.push(place);
    valuesOut.push(y[i] ?? Number.NaN);
  });
  return { name, x: placesOut, y: valuesOut };
}
