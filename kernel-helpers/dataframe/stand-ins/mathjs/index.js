/**
 * The five statistics that danfojs-node calls.
 *
 * The variance divides by n - 1. Of one value it is not determined, so it is NaN here, not 0; an empty cell
 * (null, undefined) makes a statistic NaN, because it is not zero.
 */

function numbers(values) {
  return Array.from(values, (value) => (value === null || value === undefined ? Number.NaN : Number(value)));
}

function mean(values) {
  const list = numbers(values);
  return list.reduce((a, b) => a + b, 0) / list.length;
}

function variance(values) {
  const list = numbers(values);
  const middle = mean(list);
  return list.length < 2
    ? Number.NaN
    : list.reduce((sum, value) => sum + (value - middle) ** 2, 0) / (list.length - 1);
}

function std(values) {
  return Math.sqrt(variance(values));
}

function median(values) {
  const list = numbers(values);
  if (list.length === 0 || list.some(Number.isNaN)) return Number.NaN;
  list.sort((a, b) => a - b);
  const half = Math.floor(list.length / 2);
  return list.length % 2 === 1 ? list[half] : (list[half - 1] + list[half]) / 2;
}

/** Every most frequent value, in the order in which they first appear. */
function mode(values) {
  const counts = new Map();
  for (const value of values) counts.set(value, (counts.get(value) ?? 0) + 1);
  const most = Math.max(...counts.values());
  return [...counts].filter(([, count]) => count === most).map(([value]) => value);
}

module.exports = { mean, std, variance, median, mode };
