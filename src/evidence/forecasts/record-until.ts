import type { Observations, ObservedGroup } from "../../record/index.js";

/** A record that ends with row `last` of one of its groups, and holds that group alone. */
export function recordUntil(observations: Observations, group: ObservedGroup, last: number): Observations {
  const end = last + 1;
  const byName = <T>(columns: Readonly<Record<string, T>>, cut: (column: T) => T): Record<string, T> =>
    Object.fromEntries(Object.entries(columns).map(([name, column]) => [name, cut(column)]));
  const { withoutValue, ...rest } = group;
  const kept = withoutValue?.index.filter((at) => at < group.index[last]!).length ?? 0;
  const cut: ObservedGroup = {
    ...rest,
    index: group.index.slice(0, end),
    time: group.time.slice(0, end),
    rows: group.rows.slice(0, end),
    values: byName(group.values, (column) => column.slice(0, end)),
    inputs: byName(group.inputs, (column) => column.slice(0, end)),
    ...(withoutValue && {
      withoutValue: {
        index: withoutValue.index.slice(0, kept),
        rows: withoutValue.rows.slice(0, kept),
        inputs: byName(withoutValue.inputs, (column) => column.slice(0, kept)),
      },
    }),
    ...(group.labels && { labels: group.labels.slice(0, end) }),
    ...(group.weights && { weights: group.weights.slice(0, end) }),
    ...(group.censoring && { censoring: byName(group.censoring, (column) => column.slice(0, end)) }),
    ...(group.replicates && {
      replicates: byName(group.replicates, ({ count, deviation }) => ({
        count: count.slice(0, end),
        deviation: deviation.slice(0, end),
      })),
    }),
  };
  return { ...observations, groups: [cut] };
}
