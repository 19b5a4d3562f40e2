import { count, numberFormat, percent, significant } from "../wording/index.js";
import { durationText } from "./duration-text.js";

/** State of a progress line. */
export interface ProgressState {
  readonly label: string;
  readonly done: number;
  /** Undefined when unknown. */
  readonly total: number | undefined;
  readonly seconds: number;
}

/** "Resamples: 57 of 200 (28%), 19 per second, 7.5 s left" */
export function progressLine({ label, done, total, seconds }: ProgressState): string {
  const rate = done / seconds;
  const parts = [
    total === undefined
      ? `${count(done)} done`
      : `${count(done)} of ${count(total)} (${percent(Math.floor((100 * done) / total) / 100)})`,
    ...(done > 0 ? [`${each(rate)} per second`] : []),
    ...(done > 0 && total !== undefined ? [`${durationText((total - done) / rate)} left`] : []),
  ];
  return `${label}: ${parts.join(", ")}`;
}

/** The line that remains at the end: "Resamples: 200 of 200 in 11 s, 19 per second." */
export function finalLine(state: ProgressState, stopped: boolean): string {
  const { label, done, total, seconds } = state;
  const whole = total === undefined ? count(done) : `${count(done)} of ${count(total)}`;
  if (stopped) return `${label}: stopped at ${whole} after ${durationText(seconds)}.`;
  return `${label}: ${whole} in ${durationText(seconds)}, ${each(done / seconds)} per second.`;
}

function each(rate: number): string {
  return significant(Number(rate.toPrecision(2)), 2, numberFormat());
}
