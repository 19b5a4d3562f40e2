import type { ObservedGroup } from "../observations.js";

/** The recorded values of an input by period, up to the last row that has one; NaN where the record has none. */
export function inputByPeriod(group: ObservedGroup, input: string): Float64Array {
  const { index, inputs, withoutValue } = group;
  const last = Math.max(index[index.length - 1]!, withoutValue?.index.at(-1) ?? 0);
  const column = new Float64Array(last + 1).fill(Number.NaN);
  const put = (at: Int32Array, values: Float64Array | undefined): void =>
    at.forEach((period, row) => {
      column[period] = values?.[row] ?? Number.NaN;
    });
  if (withoutValue) put(withoutValue.index, withoutValue.inputs[input]);
  put(index, inputs[input]);
  return column;
}
