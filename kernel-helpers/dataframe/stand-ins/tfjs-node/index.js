/**
 * The few tensor operations that danfojs-node calls, on plain double-precision arrays.
 *
 * The library of this name computes in single precision, which turns 0.1 + 0.2 into 0.30000001192. Here
 * every operation is the IEEE double one. A tensor has rank 0, 1 or 2; data is row-major.
 */

class Tensor {
  constructor(data, shape) {
    this.data = data;
    this.shape = shape;
    this.rank = shape.length;
    this.size = data.length;
  }

  arraySync() {
    if (this.rank === 0) return this.data[0];
    if (this.rank === 1) return Array.from(this.data);
    const [rows, columns] = this.shape;
    return Array.from({ length: rows }, (_, row) =>
      Array.from(this.data.slice(row * columns, (row + 1) * columns)),
    );
  }

  dataSync() {
    return this.data;
  }

  clone() {
    return new Tensor(this.data.slice(), this.shape.slice());
  }

  transpose() {
    if (this.rank < 2) return this.clone();
    const [rows, columns] = this.shape;
    const data = Array.from(
      { length: this.size },
      (_, i) => this.data[(i % rows) * columns + Math.floor(i / rows)],
    );
    return new Tensor(data, [columns, rows]);
  }

  sqrt() {
    return new Tensor(this.data.map(Math.sqrt), this.shape);
  }

  argMax() {
    return scalar(placeOfBest(this.data, (a, b) => a > b));
  }

  argMin() {
    return scalar(placeOfBest(this.data, (a, b) => a < b));
  }

  max(axis) {
    return down(this, axis, (values) => values.reduce((a, b) => Math.max(a, b), -Infinity));
  }

  min(axis) {
    return down(this, axis, (values) => values.reduce((a, b) => Math.min(a, b), Infinity));
  }

  mean(axis) {
    return down(this, axis, mean);
  }
}

/** Of two tensors: equal shapes, or one of them a scalar, a row, or a column of the other. */
function pairwise(left, right, combine) {
  const other = right instanceof Tensor ? right : scalar(right);
  const rank = Math.max(left.rank, other.rank);
  const [a, b] = [left, other].map((t) => [...new Array(rank - t.rank).fill(1), ...t.shape]);
  const shape = a.map((length, i) => commonLength(length, b[i], left, other));
  const columns = rank === 0 ? 1 : shape[rank - 1];
  const size = shape.reduce((product, length) => product * length, 1);
  const data = new Array(size);
  for (let i = 0; i < size; i++) {
    const [row, column] = [Math.floor(i / columns), i % columns];
    data[i] = combine(left.data[place(a, row, column)], other.data[place(b, row, column)]);
  }
  return new Tensor(data, shape);
}

function place(shape, row, column) {
  const columns = shape.length === 0 ? 1 : shape[shape.length - 1];
  const rows = shape.length < 2 ? 1 : shape[0];
  return (rows === 1 ? 0 : row) * columns + (columns === 1 ? 0 : column);
}

function commonLength(a, b, left, right) {
  if (a === b || b === 1) return a;
  if (a === 1) return b;
  throw new Error(`Shapes ${left.shape} and ${right.shape} do not fit together.`);
}

function down(tensor, axis, summary) {
  if (tensor.rank < 2 || axis === undefined) return scalar(summary(tensor.data));
  if (axis !== 0) throw new Error(`Only axis 0 is reduced here; axis ${axis} was asked for.`);
  const [rows, columns] = tensor.shape;
  const column = (c) => Array.from({ length: rows }, (_, row) => tensor.data[row * columns + c]);
  return new Tensor(
    Array.from({ length: columns }, (_, c) => summary(column(c))),
    [columns],
  );
}

function placeOfBest(values, better) {
  let best = 0;
  for (let i = 1; i < values.length; i++) if (better(values[i], values[best])) best = i;
  return best;
}

function mean(values) {
  return values.reduce((a, b) => a + b, 0) / values.length;
}

function variance(values) {
  const middle = mean(values);
  return mean(values.map((value) => (value - middle) ** 2));
}

const operations = {
  add: (a, b) => a + b,
  sub: (a, b) => a - b,
  mul: (a, b) => a * b,
  div: (a, b) => a / b,
  divNoNan: (a, b) => (b === 0 ? 0 : a / b),
  pow: (a, b) => a ** b,
  // Takes the sign of the divisor, so that floor(a / b) * b + mod = a.
  mod: (a, b) => a - Math.floor(a / b) * b,
  greater: (a, b) => (a > b ? 1 : 0),
  greaterEqual: (a, b) => (a >= b ? 1 : 0),
  less: (a, b) => (a < b ? 1 : 0),
  lessEqual: (a, b) => (a <= b ? 1 : 0),
  equal: (a, b) => (a === b ? 1 : 0),
  notEqual: (a, b) => (a !== b ? 1 : 0),
};
for (const [name, combine] of Object.entries(operations)) {
  Tensor.prototype[name] = function (other) {
    return pairwise(this, other, combine);
  };
}

/** An empty cell (null, undefined) is not zero: it becomes NaN. */
function asNumber(value) {
  return value === null || value === undefined ? Number.NaN : Number(value);
}

function scalar(value) {
  return new Tensor([asNumber(value)], []);
}

function tensor1d(values) {
  return new Tensor(Array.from(values, asNumber), [values.length]);
}

function tensor2d(values, shape) {
  const data = Array.from(values, (row) => (typeof row === "object" && row !== null ? Array.from(row) : row));
  const flat = data.flat().map(asNumber);
  const rows = shape?.[0] ?? values.length;
  return new Tensor(flat, [rows, shape?.[1] ?? (rows === 0 ? 0 : flat.length / rows)]);
}

function moments(tensor, axis) {
  return { mean: tensor.mean(axis), variance: down(tensor, axis, variance) };
}

/** A small seeded generator (xorshift of 32 bits, its state hashed from the seed's text) for `sample`. */
function generator(seed) {
  let state = 2166136261;
  for (const letter of String(seed)) state = Math.imul(state ^ letter.codePointAt(0), 16777619);
  state = state >>> 0 || 1;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state / 4294967296;
  };
}

/** All rows in an order drawn from the seed (Fisher-Yates), for `sample`. */
const data = {
  array: (values) => ({
    shuffle(_window, seed) {
      const [draw, rows] = [generator(seed), Array.from(values)];
      for (let last = rows.length - 1; last > 0; last--) {
        const chosen = Math.floor(draw() * (last + 1));
        [rows[last], rows[chosen]] = [rows[chosen], rows[last]];
      }
      return { take: (count) => ({ toArray: async () => rows.slice(0, count) }) };
    },
  }),
};

module.exports = { Tensor, scalar, tensor1d, tensor2d, moments, data };
