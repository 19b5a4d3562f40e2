import { count, numberFormat, percent, significant } from "../wording/index.js";
import { durationText } from "./duration-text.js";

/** How far a piece of work is. */
export interface Standing {
  readonly label: string;
  readonly done: number;
  /** Undefined when it is not known how much there is to do. */
  readonly total: number | undefined;
  readonly seconds: number;
}

/** "Refits: 57 of 200 (28%), 19 a second, 7.5 s left" */
export function progressLine({ label, done, total, seconds }: Standing): string {
  const rate = done / seconds;
  const parts = [
    total === undefined
      ? `${count(done)} done`
      : `${count(done)} of ${count(total)} (${percent(Math.floor((100 * done) / total) / 100)})`,
    ...(done > 0 ? [`${each(rate)} a second`] : []),
    ...(done > 0 && total !== undefined ? [`${durationText((total - done) / rate)} left`] : []),
  ];
  return `${label}: ${parts.join(", ")}`;
}

/** What stays when the work is over: "Refits: 200 of 200 in 11 s, 19 a second." */
export function progressRecord(standing: Standing, stopped: boolean): string {
  const { label, done, total, seconds } = standing;
  const whole = total === undefined ? count(done) : `${count(done)} of ${count(total)}`;
  if (stopped) return `${label}: stopped at ${whole} after ${durationText(seconds)}.`;
  return `${label}: ${whole} in ${durationText(seconds)}, ${each(done / seconds)} a second.`;
}

function each(rate: number): string {
  return significant(Number(rate.toPrecision(2)), 2, numberFormat());
}
