import type { Observations, ObservedGroup, PeriodAxis } from "../../src/record/index.js";

/** Columns of one series, by name; `t` holds the periods, 0, 1, ... when absent. */
export type Columns = Readonly<Record<string, readonly number[]>>;

/** A record of one group, or of several by name, with the columns named in `inputs` as inputs and the rest as states. */
export function record(
  given: Columns | Readonly<Record<string, Columns>>,
  extra: Partial<ObservedGroup> & { readonly inputNames?: readonly string[] } = {},
): Observations {
  const isOne = Object.values(given).some(Array.isArray);
  const series = (isOne ? { "": given } : given) as Readonly<Record<string, Columns>>;
  const { inputNames = [], ...fields } = extra;
  const groups = Object.entries(series).map(([name, columns]) => groupOf(name, columns, inputNames, fields));
  const read = groups.reduce((sum, group) => sum + group.index.length, 0);
  return {
    kind: "observations",
    groups,
    states: Object.keys(groups[0]!.values).map((name) => ({
      name,
      column: name,
      unit: "",
      measured: "level",
    })),
    axis: groups[0]!.axis,
    inputs: inputNames,
    order: "",
    findings: [],
    counts: { read, used: read, flagged: 0, corrected: 0, refused: 0 },
  };
}

function groupOf(
  name: string,
  columns: Columns,
  inputNames: readonly string[],
  fields: Partial<ObservedGroup>,
): ObservedGroup {
  const count = Object.values(columns)[0]!.length;
  const time = Float64Array.from(columns["t"] ?? Array.from({ length: count }, (_, t) => t));
  const pick = (wanted: (column: string) => boolean): Record<string, Float64Array> =>
    Object.fromEntries(
      Object.entries(columns)
        .filter(([column]) => column !== "t" && wanted(column))
        .map(([column, values]) => [column, Float64Array.from(values)]),
    );
  return {
    name,
    axis: numbered(time[0]!),
    index: Int32Array.from(time, (at) => at - time[0]!),
    time,
    values: pick((column) => !inputNames.includes(column)),
    inputs: pick((column) => inputNames.includes(column)),
    rows: Int32Array.from({ length: count }, (_, row) => row + 1),
    ...fields,
  };
}

/** Weeks by number, from a first one on. */
export function numbered(origin: number): PeriodAxis {
  const step = { every: 1, of: "week" };
  return {
    kind: "period-axis",
    column: "t",
    unit: "week",
    step,
    form: "number",
    counts: "numbers",
    origin,
    stride: 1,
  };
}
