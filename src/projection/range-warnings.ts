import type { Warning } from "../numeric/index.js";
import type { CentralPath } from "./central-path.js";

/**
 * What a reader must know where paths leave the range of a state.
 *
 * @param period - a row's period in words.
 */
export function rangeWarnings(
  central: CentralPath,
  period: (row: number) => string,
  left: number,
  paths: number,
): Warning[] {
  const found: Warning[] = [];
  const { stop } = central;
  if (stop !== undefined)
    found.push({
      code: "path-leaves-range",
      message: `At ${period(stop.row)} the rule gives ${stop.state} = ${Number(stop.value.toPrecision(4))}; the path without random change stops at ${period(Math.max(0, stop.row - 1))}.`,
    });
  if (left > 0 && paths > 1) {
    const error = Math.sqrt((left * (1 - left)) / paths);
    found.push({
      code: "paths-leave-range",
      message: `A share of ${left.toPrecision(2)} of the paths (Monte-Carlo error ${error.toPrecision(1)}) leaves the range of a state before the end; bands are those of the others.`,
    });
  }
  return found;
}
