/** A complex number. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export const complex = (re: number, im = 0): Complex => ({ re, im });
export const plusC = (a: Complex, b: Complex): Complex => complex(a.re + b.re, a.im + b.im);
export const minusC = (a: Complex, b: Complex): Complex => complex(a.re - b.re, a.im - b.im);
export const timesC = (a: Complex, b: Complex): Complex =>
  complex(a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re);
export const modulus = (a: Complex): number => Math.hypot(a.re, a.im);

export function overC(a: Complex, b: Complex): Complex {
  const scale = Math.max(Math.abs(b.re), Math.abs(b.im));
  const [re, im] = [b.re / scale, b.im / scale];
  const size = (re * re + im * im) * scale;
  return complex((a.re * re + a.im * im) / size, (a.im * re - a.re * im) / size);
}

/** A power with a whole exponent, by repeated squaring. */
export function powerC(base: Complex, exponent: number): Complex {
  let [result, square] = [complex(1), base];
  for (let left = exponent; left > 0; left = Math.floor(left / 2)) {
    if (left % 2 === 1) result = timesC(result, square);
    square = timesC(square, square);
  }
  return result;
}

/** Solves a square system by elimination with the largest pivot first. */
export function solveC(
  matrix: readonly (readonly Complex[])[],
  right: readonly Complex[],
): readonly Complex[] {
  const rows = matrix.map((row, i) => [...row, right[i]!]);
  const size = rows.length;
  for (let k = 0; k < size; k++) {
    const best = rows
      .slice(k)
      .reduce((most, row, i) => (modulus(row[k]!) > modulus(rows[most]![k]!) ? i + k : most), k);
    [rows[k], rows[best]] = [rows[best]!, rows[k]!];
    for (let i = k + 1; i < size; i++) {
      const factor = overC(rows[i]![k]!, rows[k]![k]!);
      for (let j = k; j <= size; j++) rows[i]![j] = minusC(rows[i]![j]!, timesC(factor, rows[k]![j]!));
    }
  }
  const solution: Complex[] = new Array(size);
  for (let i = size - 1; i >= 0; i--) {
    let sum = rows[i]![size]!;
    for (let j = i + 1; j < size; j++) sum = minusC(sum, timesC(rows[i]![j]!, solution[j]!));
    solution[i] = overC(sum, rows[i]![i]!);
  }
  return solution;
}
