import type { LinearisedSystem } from "../../numeric/index.js";
import type { CompiledRule } from "../../rule/index.js";
import type { Comparisons } from "./comparisons-of.js";
import { factorSums } from "./factor-sums.js";
import type { RefitProblem } from "./refitter.js";
import { type Run, runsOf } from "./runs-of.js";

/** The sums of squares of a problem, and the values behind them. */
export interface Sums {
  readonly system: LinearisedSystem;
  use(values: Float64Array): void;
  sumAt(unknowns: Float64Array): number;
  fitted(unknowns: Float64Array, out: Float64Array): void;
}

/** Runs the rule over the record and gathers J'J, J'r and r'r of the values that count. */
export function residualSums(
  problem: RefitProblem,
  compiled: CompiledRule,
  compared: Comparisons,
  counts: Float64Array,
): Sums {
  const { rule, names } = problem;
  const states = rule.states.length;
  const width = rule.constants.length + states;
  const log = problem.options.spread === "proportional";
  const process = problem.options.errors === "process";
  const size = names.length;
  const constants = Float64Array.from(rule.constants, (name) => problem.constants[name] ?? Number.NaN);
  const initial = Float64Array.from(rule.states, (state) => problem.initial[state] ?? Number.NaN);
  const columns = Int32Array.from(names, (name) => {
    const constant = rule.constants.indexOf(name);
    return constant >= 0 ? constant : rule.constants.length + rule.states.indexOf(name.slice(0, -3));
  });
  const { runs, inputs, longest } = runsOf(problem, compared);
  const path = new Float64Array((longest + 1) * states);
  const slopes = new Float64Array(path.length * width);
  let record: Float64Array = compared.values.slice();
  const target = new Float64Array(compared.count);
  const gram = new Float64Array(size * size);
  const gradient = new Float64Array(size);
  const triangle = new Float64Array(size * size);
  const projected = new Float64Array(size);
  const row = new Float64Array(size);
  let sum = Number.NaN;

  const use = (values: Float64Array): void => {
    record = values;
    for (let i = 0; i < target.length; i++) {
      const value = values[compared.row[i]! * states + compared.state[i]!]!;
      target[i] = log ? Math.log(value) : value;
    }
  };
  const place = (at: Float64Array): void => {
    for (let a = 0; a < size; a++) {
      const column = columns[a]!;
      if (column < constants.length) constants[column] = at[a]!;
      else initial[column - constants.length] = at[a]!;
    }
  };
  const startOf = (run: Run): Float64Array =>
    process ? record.subarray(run.row * states, (run.row + 1) * states) : initial;
  const isIdle = (run: Run): boolean => {
    for (let i = run.first; i < run.end; i++) if (counts[i] !== 0) return false;
    return true;
  };
  const gather = (run: Run): void => {
    for (let i = run.first; i < run.end; i++) {
      if (counts[i] === 0) continue;
      const cell = (compared.index[i]! - run.from) * states + compared.state[i]!;
      const value = path[cell]!;
      const residual = target[i]! - (log ? Math.log(value) : value);
      sum += residual * residual;
      const weight = log ? -1 / value : -1;
      for (let a = 0; a < size; a++) row[a] = weight * slopes[cell * width + columns[a]!]!;
      for (let a = 0; a < size; a++) {
        gradient[a] = gradient[a]! + row[a]! * residual;
        for (let b = a; b < size; b++) gram[a * size + b] = gram[a * size + b]! + row[a]! * row[b]!;
      }
    }
  };
  use(record);
  return {
    use,
    system: {
      size,
      triangle,
      projected,
      evaluate(at) {
        place(at);
        gram.fill(0);
        gradient.fill(0);
        sum = 0;
        for (const run of runs) {
          if (isIdle(run)) continue;
          compiled.pathWithSensitivities(startOf(run), constants, inputs, run.from, run.span, path, slopes);
          gather(run);
        }
        return sum;
      },
      linearise: () => Number.isFinite(sum) && factorSums(gram, gradient, triangle, projected),
    },
    sumAt(at) {
      place(at);
      let total = 0;
      for (const run of runs) {
        if (isIdle(run)) continue;
        compiled.path(startOf(run), constants, inputs, run.from, run.span, path);
        for (let i = run.first; i < run.end; i++) {
          const value = path[(compared.index[i]! - run.from) * states + compared.state[i]!]!;
          const residual = target[i]! - (log ? Math.log(value) : value);
          if (counts[i] !== 0) total += residual * residual;
        }
      }
      return total;
    },
    fitted(at, out) {
      place(at);
      for (const run of runs) {
        compiled.path(startOf(run), constants, inputs, run.from, run.span, path);
        for (let i = run.first; i < run.end; i++)
          out[i] = path[(compared.index[i]! - run.from) * states + compared.state[i]!]!;
      }
    },
  };
}
