import { type LinearisedSystem, rotateRowIn } from "../../numeric/index.js";
import type { FitRows } from "../rows/fit-rows.js";

/**
 * A least-squares system that rotates one row of derivatives after the other into its triangle. Slower than sums of
 * products, but it does not square their condition: directions in which the sum changes little are not lost.
 */
export function rotatedSystem(rows: FitRows): LinearisedSystem {
  const { size } = rows;
  const gathered = new Float64Array(size * size);
  const right = new Float64Array(size);
  const row = new Float64Array(size);
  const triangle = new Float64Array(size * size);
  const projected = new Float64Array(size);
  return {
    size,
    triangle,
    projected,
    evaluate(at) {
      rows.prepare(at, true);
      gathered.fill(0);
      right.fill(0);
      let sum = 0;
      for (let i = 0; i < rows.count; i++) {
        const residual = rows.residualAt(i);
        sum += residual * residual;
        row.set(rows.row);
        rotateRowIn(gathered, right, row, residual, 0, size, size);
      }
      return sum;
    },
    linearise() {
      triangle.set(gathered);
      projected.set(right);
      return gathered.every(Number.isFinite);
    },
  };
}
