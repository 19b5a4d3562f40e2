import { tableOf } from "../column-table.js";
import type { Observations, ObservedGroup, ReplicateVariation } from "../observations.js";
import { axisOfRows } from "../period/axis-of-rows.js";
import { labelAt, type PeriodAxis, periodsAfter } from "../period/period-axis.js";
import { placedRows } from "../period/placed-rows.js";
import { inputByPeriod } from "./input-by-period.js";
import { axesDiffer, rowsOverlap } from "./refusals.js";

/**
 * A record with later rows behind its own: groups by name, periods by the axis, so that rows read on their own find the
 * place they would have had in one record.
 *
 * @throws {ModelError} `rows-overlap` where rows are not later than the record's; `axes-differ` where they count other periods.
 */
export function joined(record: Observations, later: Observations): Observations {
  const rowsBefore = record.counts.read + (record.counts.aside ?? 0);
  const groups = record.groups.map((group) => {
    const rows = later.groups.find(({ name }) => name === group.name);
    return rows === undefined ? group : joinedGroup(group, rows, rowsBefore);
  });
  const sum = (key: "read" | "used" | "flagged" | "corrected" | "refused"): number =>
    record.counts[key] + later.counts[key];
  return {
    ...record,
    groups,
    axis: groups.length === 1 ? groups[0]!.axis : record.axis,
    findings: [
      ...record.findings,
      ...later.findings.map((finding) => ({
        ...finding,
        row: finding.row === undefined ? undefined : finding.row + rowsBefore,
        message: `Of the rows added: ${finding.message}`,
      })),
    ],
    ...decisionsOf(record, later, rowsBefore),
    counts: {
      ...record.counts,
      read: sum("read"),
      used: sum("used"),
      flagged: sum("flagged"),
      corrected: sum("corrected"),
      refused: sum("refused"),
    },
  };
}

function decisionsOf(
  record: Observations,
  later: Observations,
  rowsBefore: number,
): Pick<Observations, "decisions"> {
  const { decisions = [] } = later;
  const all = [
    ...(record.decisions ?? []),
    ...decisions.map((each) => ({ ...each, row: each.row + rowsBefore })),
  ];
  return all.length === 0 ? {} : { decisions: all };
}

function joinedGroup(group: ObservedGroup, later: ObservedGroup, rowsBefore: number): ObservedGroup {
  const { axis } = group;
  const shift = periodsAfter(axis, later.axis);
  if (shift === undefined) throw axesDiffer(axis, later.axis);
  const last = group.index[group.index.length - 1]!;
  if (shift <= last) throw rowsOverlap(group.name, labelAt(axis, shift), labelAt(axis, last));
  const moved: ObservedGroup = {
    ...later,
    index: later.index.map((at) => at + shift),
    rows: later.rows.map((row) => row + rowsBefore),
    time:
      axis.counts === "numbers"
        ? later.time
        : Float64Array.from(later.index, (at) => group.time[0]! + (at + shift) * axis.step.every),
    ...(later.withoutValue && {
      withoutValue: {
        ...later.withoutValue,
        index: later.withoutValue.index.map((at) => at + shift),
        rows: later.withoutValue.rows.map((row) => row + rowsBefore),
      },
    }),
  };
  const index = joinedNumbers(group.index, moved.index);
  const labels = group.labels && later.labels && [...group.labels, ...later.labels];
  return {
    name: group.name,
    axis: labels === undefined ? axis : axisOfLabels(axis, labels, index),
    index,
    time: joinedValues(group.time, moved.time),
    values: named(group.values, (values, state) => joinedValues(values, later.values[state]!)),
    rows: joinedNumbers(group.rows, moved.rows),
    ...joinedInputs(group, moved, index),
    ...(labels && { labels }),
    ...joinedMarks(group, later),
  };
}

function axisOfLabels(axis: PeriodAxis, labels: readonly string[], index: Int32Array): PeriodAxis {
  const { column, calendar, step } = axis;
  const placed = placedRows(tableOf({ [column]: labels }), column, calendar ?? step);
  return axisOfRows(placed, { rows: Int32Array.from(labels.keys()), index });
}

/** Inputs of periods with a value and of those without; a period that had only inputs may have its value now. */
function joinedInputs(
  group: ObservedGroup,
  later: ObservedGroup,
  index: Int32Array,
): Pick<ObservedGroup, "inputs" | "withoutValue"> {
  const columns = named(group.inputs, (_values, input) => {
    const [before, after] = [inputByPeriod(group, input), inputByPeriod(later, input)];
    return (period: number): number => [after[period], before[period]].find(Number.isFinite) ?? Number.NaN;
  });
  const at = (periods: Int32Array): ObservedGroup["inputs"] =>
    named(columns, (valueAt) => Float64Array.from(periods, valueAt));
  const withValue = new Set(index);
  const others = [group, later].flatMap(({ withoutValue }) =>
    Array.from(withoutValue?.index ?? [], (period, i) => ({ period, row: withoutValue!.rows[i]! })),
  );
  const left = others.filter(({ period }) => !withValue.has(period));
  if (left.length === 0) return { inputs: at(index) };
  const periods = Int32Array.from(left, ({ period }) => period);
  const rows = Int32Array.from(left, ({ row }) => row);
  return { inputs: at(index), withoutValue: { index: periods, inputs: at(periods), rows } };
}

/** Weights, limits and replicates, each where one of the two has them. */
function joinedMarks(group: ObservedGroup, later: ObservedGroup): Partial<ObservedGroup> {
  const marksOf = (from: ObservedGroup, state: string): Int8Array =>
    from.censoring?.[state] ?? new Int8Array(from.index.length);
  const single = ({ index }: ObservedGroup): ReplicateVariation => ({
    count: new Int32Array(index.length).fill(1),
    deviation: new Float64Array(index.length).fill(Number.NaN),
  });
  const replicatesOf = (from: ObservedGroup, state: string): ReplicateVariation =>
    from.replicates?.[state] ?? single(from);
  return {
    ...((group.weights ?? later.weights) && { weights: joinedValues(weightsOf(group), weightsOf(later)) }),
    ...((group.censoring ?? later.censoring) && {
      censoring: named(group.values, (_values, state) =>
        Int8Array.from([...marksOf(group, state), ...marksOf(later, state)]),
      ),
    }),
    ...((group.replicates ?? later.replicates) && {
      replicates: named(group.values, (_values, state) => {
        const [before, after] = [replicatesOf(group, state), replicatesOf(later, state)];
        return {
          count: joinedNumbers(before.count, after.count),
          deviation: joinedValues(before.deviation, after.deviation),
        };
      }),
    }),
  };
}

function weightsOf(group: ObservedGroup): Float64Array {
  return group.weights ?? new Float64Array(group.index.length).fill(1);
}

function joinedValues(before: Float64Array, after: Float64Array): Float64Array {
  return Float64Array.from([...before, ...after]);
}

function joinedNumbers(before: Int32Array, after: Int32Array): Int32Array {
  return Int32Array.from([...before, ...after]);
}

function named<A, B>(
  columns: Readonly<Record<string, A>>,
  of: (column: A, name: string) => B,
): Record<string, B> {
  return Object.fromEntries(Object.entries(columns).map(([name, column]) => [name, of(column, name)]));
}
