import { type Axis, type Figure, figure } from "./figure.js";
import { significant } from "./number-text.js";

/** How an answer moves when one parameter is lowered and raised. */
export interface AnswerChange {
  readonly parameter: string;
  /** Change of the answer, in its unit. */
  readonly lowered: number;
  readonly raised: number;
}

/** What `sensitivityFigure` draws. */
export interface SensitivityFigureOptions {
  readonly title: string;
  /** What changes, with its unit. */
  readonly answer: Axis;
  /** By how much each parameter is moved: "one standard error", "ten per cent". The two are different figures. */
  readonly by: string;
  readonly changes: readonly AnswerChange[];
  readonly notes?: readonly string[];
}

/** Change of an answer for a small change of each parameter: bars to both sides of no change, the longest on top. */
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
        lying: true,
        name: `lowered by ${by}`,
        x: sorted.map((each) => each.lowered),
        y: names,
        style: 2,
      },
      {
        mark: "bars",
        lying: true,
        name: `raised by ${by}`,
        x: sorted.map((each) => each.raised),
        y: names,
        style: 1,
      },
    ],
    notes,
    summary: first
      ? `${first.parameter} moves the answer most: by up to ${significant(reach(first))} ${answer.unit ?? ""}`.trim() +
        "."
      : "",
  });
}
