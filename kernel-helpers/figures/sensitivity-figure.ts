import { type Axis, type Figure, figure } from "./figure.js";
import { significant } from "./number-text.js";

/** Change of an answer when one parameter is lowered and raised. */
export interface AnswerChange {
  readonly parameter: string;
  /** Change of the answer, in its unit, when the parameter is lowered. */
  readonly lowered: number;
  readonly raised: number;
}

/** Options of `sensitivityFigure`. */
export interface SensitivityFigureOptions {
  readonly title: string;
  /** The answer, with its unit. */
  readonly answer: Axis;
  /** Size of the change of each parameter: "one standard error" or "10%". */
  readonly by: string;
  readonly changes: readonly AnswerChange[];
  readonly notes?: readonly string[];
}

/** Tornado chart: change of an answer for a small change of each parameter, the largest on top. */
export function sensitivityFigure(options: SensitivityFigureOptions): Figure {
  const { title, answer, by, changes, notes = [] } = options;
  const reach = ({ lowered, raised }: AnswerChange): number => Math.max(Math.abs(lowered), Math.abs(raised));
  const sorted = [...changes].sort((a, b) => reach(b) - reach(a));
  const names = sorted.map(({ parameter }) => parameter);
  const [first] = sorted;
  return figure({
    title,
    x: answer,
    y: { title: "Parameter", scale: "category" },
    layers: [
      {
        mark: "bars",
        horizontal: true,
        name: `lowered by ${by}`,
        x: sorted.map((each) => each.lowered),
        y: names,
        style: 2,
      },
      {
        mark: "bars",
        horizontal: true,
        name: `raised by ${by}`,
        x: sorted.map((each) => each.raised),
        y: names,
        style: 1,
      },
    ],
    notes,
    summary: first
      ? `The answer is most sensitive to ${first.parameter}: it changes by up to ${significant(reach(first))} ${answer.unit ?? ""}`.trim() +
        "."
      : "",
  });
}
