import type { Optimum, Sensitivity, Tradeoff } from "../../src/decision/index.js";
import { type Figure, figure, sensitivityFigure } from "../figures/index.js";
import { type Column, type Table, table } from "../tables/index.js";

/** The measure against the setting, with the best marked and how flat it is there. */
export function showBest(found: Optimum): readonly (Figure | Table)[] {
  return [
    figure({
      title: `${found.measure} against ${found.vary}`,
      x: { title: found.vary, unit: found.unit },
      y: { title: found.measure },
      layers: [
        {
          mark: "line",
          name: found.measure,
          x: found.curve.map((at) => at.value),
          y: found.curve.map((at) => at.measure),
        },
        { mark: "vertical", name: "best", x: found.value },
      ],
      notes: [found.sentence],
    }),
    table({
      title: `How much it matters to hit the best ${found.vary}`,
      columns: [
        { key: "within", label: `${found.measure} within`, kind: "percent", digits: 0 },
        { key: "from", label: `${found.vary} from`, kind: "number", digits: 4, unit: found.unit },
        { key: "to", label: "to", kind: "number", digits: 4, unit: found.unit },
      ],
      rows: found.flatness,
      notes: [found.sentence],
    }),
  ];
}

/** Two charts, which answer two questions: what the record leaves open, and what the answer hangs on. */
export function showSensitivity(found: Sensitivity): readonly (Figure | Table)[] {
  const answer = { title: `Change of ${found.measure}`, unit: found.unit };
  const open = found.rows.filter((row) => row.errorLower !== undefined && row.errorUpper !== undefined);
  const title = `Sensitivity of ${found.measure}`;
  const change = (value: number): number => (Number.isFinite(value) ? value - found.answer : Number.NaN);
  const errors =
    open.length === 0
      ? []
      : [
          sensitivityFigure({
            title,
            answer,
            by: "one standard error",
            changes: open.map((row) => ({
              parameter: row.name,
              lowered: change(row.errorLower!),
              raised: change(row.errorUpper!),
            })),
          }),
        ];
  return [
    ...errors,
    sensitivityFigure({
      title,
      answer,
      by: "ten per cent",
      changes: found.rows.map((row) => ({
        parameter: row.name,
        lowered: change(row.tenthLower),
        raised: change(row.tenthUpper),
      })),
    }),
    sensitivityTable(found),
  ];
}

function sensitivityTable(found: Sensitivity): Table {
  const answer = { kind: "number", digits: 5, unit: found.unit } as const;
  const told = (value: number | undefined): number | string =>
    value === undefined ? "not determined" : Number.isFinite(value) ? value : "never";
  return table({
    title: `${found.measure}, by parameter`,
    columns: [
      { key: "name", label: "Parameter", kind: "text" },
      { key: "value", label: "Value", kind: "number", digits: 4 },
      { key: "errorLower", label: "One standard error lower", ...answer },
      { key: "errorUpper", label: "higher", ...answer },
      { key: "tenthLower", label: "Ten per cent lower", ...answer },
      { key: "tenthUpper", label: "higher", ...answer },
      ...(found.rows.some((row) => row.tenthError > 0)
        ? [
            {
              key: "tenthError",
              label: "Monte-Carlo error of the difference",
              kind: "number",
              digits: 1,
            } as const,
          ]
        : []),
      { key: "elasticity", label: "Elasticity", kind: "number", digits: 3 },
    ],
    rows: found.rows.map((row) => ({
      ...row,
      errorLower: told(row.errorLower),
      errorUpper: told(row.errorUpper),
      tenthLower: told(row.tenthLower),
      tenthUpper: told(row.tenthUpper),
    })),
    notes: ["One parameter is moved at a time, the others stay.", found.sentence],
  });
}

/** A time that is never reached, and a number that no path has, in words. */
const shownAnswer = (value: number): number | string => {
  if (Number.isNaN(value)) return "no path in range";
  return Number.isFinite(value) ? value : "never";
};

/** One curve an answer, and all of them in a table. */
export function showTradeoff(found: Tradeoff): readonly (Figure | Table)[] {
  const names = Object.keys(found.answers);
  const settings = found.rows.map((row) => row.value);
  const isShare = (name: string): boolean =>
    "probability" in found.answers[name]! || "share" in found.answers[name]!;
  const columns = names.flatMap((name): Column[] => {
    const simulated = found.rows.some((row) => row.errors[name]! > 0);
    const error: Column = { key: `${name} error`, label: "Monte-Carlo error", kind: "number", digits: 1 };
    if (isShare(name)) return [{ key: name, label: name, kind: "probability", pairedWith: error.key }, error];
    return [{ key: name, label: name, kind: "number", digits: 5 }, ...(simulated ? [error] : [])];
  });
  const left = found.rows.some((row) => row.left > 0);
  return [
    figure({
      title: `Choices of ${found.vary}`,
      panels: names.map((name) => ({
        title: name,
        x: { title: found.vary, unit: found.unit },
        y: { title: found.measures[name]! },
        layers: [{ mark: "line", name, x: settings, y: found.rows.map((row) => row.answers[name]!) }],
      })),
    }),
    table({
      title: `Choices of ${found.vary}`,
      columns: [
        { key: "setting", label: found.vary, kind: "number", digits: 6, unit: found.unit },
        ...columns,
        ...(left
          ? [{ key: "left", label: "Share of paths out of range", kind: "probability" } as const]
          : []),
      ],
      rows: found.rows.map((row) => ({
        setting: row.value,
        left: row.left,
        ...Object.fromEntries(
          names.flatMap((name) => [
            [name, shownAnswer(row.answers[name]!)],
            [`${name} error`, row.errors[name]],
          ]),
        ),
      })),
      notes: [
        ...names.map((name) => `${name}: ${found.measures[name]}.`),
        "All choices were run with the same random numbers.",
      ],
    }),
  ];
}
