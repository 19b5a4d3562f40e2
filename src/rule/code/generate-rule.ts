import type { Advance, CompiledRule, PathSums, StepSums } from "../compiled-rule.js";
import { modulo, roundTo } from "../graph/operations.js";
import type { RuleGraph } from "../graph/rule-graph.js";
import { advanceSource, quantitiesSource } from "./advance-source.js";
import { interpretGraph } from "./interpret-graph.js";
import { pathSource, stepSource } from "./path-source.js";
import { sensitivitySource } from "./sensitivity-source.js";
import { stepSumsSource } from "./step-sums-source.js";
import { sumsSource } from "./sums-source.js";

/** Wider sensitivity tables exceed the registers many times over; the interpreter handles them. */
const maxTableSize = 400;

/** With more unknowns than this the sums no longer fit into registers, and are computed from a table instead. */
const maxSummedUnknowns = 8;

/** Functions by their source: rules with the same code share one optimised function. */
const functionCache = new Map<string, unknown>();
const maxCached = 500;

/** Compiles source that contains only slots, numbers and operations of our own tables. */
function makeFunction<T>(parameters: string, body: string): T {
  const source = `"use strict";\nreturn (${parameters}) => {\n${body}\n};`;
  let found = functionCache.get(source);
  if (found === undefined) {
    if (functionCache.size >= maxCached) functionCache.clear();
    found = new Function("roundTo", "modulo", source)(roundTo, modulo);
    functionCache.set(source, found);
  }
  return found as T; // the parameters and the body are those of the member that T names
}

/** Defers the work to the first call and keeps its result. */
function lazy<T>(make: () => T): () => T {
  let found: T | undefined;
  return () => {
    found ??= make();
    return found;
  };
}

/** The rule as generated functions, each compiled on first use. */
export function generateRule(rule: RuleGraph): CompiledRule {
  const step = lazy(() =>
    makeFunction<CompiledRule["step"]>("state, parameters, inputs, t, next", stepSource(rule)),
  );
  const path = lazy(() =>
    makeFunction<CompiledRule["path"]>(
      "initial, parameters, inputs, from, periods, values",
      pathSource(rule),
    ),
  );
  const pathWithSensitivities = lazy(() =>
    rule.states * (rule.states + rule.parameters) > maxTableSize
      ? interpretGraph(rule).pathWithSensitivities
      : makeFunction<CompiledRule["pathWithSensitivities"]>(
          "initial, parameters, inputs, from, periods, values, sensitivities",
          sensitivitySource(rule),
        ),
  );
  const [plainSums, logSums] = [false, true].map((logarithmic) =>
    lazy(() =>
      makeFunction<PathSums>(
        "initial, parameters, inputs, from, periods, observed, weights, sums",
        sumsSource(rule, logarithmic),
      ),
    ),
  ) as [() => PathSums, () => PathSums];
  const [advance, advanceEach] = [true, false].map((shared) =>
    lazy(() =>
      makeFunction<Advance>("present, first, last, parameters, inputs, t", advanceSource(rule, shared)),
    ),
  ) as [() => Advance, () => Advance];
  const quantities = lazy(() =>
    makeFunction<CompiledRule["quantities"]>(
      "present, first, last, parameters, stride, inputs, t, out",
      quantitiesSource(rule),
    ),
  );
  const [plainSteps, logSteps] = [false, true].map((logarithmic) =>
    lazy(() =>
      makeFunction<StepSums>(
        "parameters, inputs, periods, from, observed, weights, sums",
        stepSumsSource(rule, logarithmic),
      ),
    ),
  ) as [() => StepSums, () => StepSums];
  const summed = rule.states + rule.parameters <= maxSummedUnknowns;
  return {
    stepSums: summed ? (logarithmic) => (logarithmic ? logSteps() : plainSteps()) : undefined,
    pathSums: summed ? (logarithmic) => (logarithmic ? logSums() : plainSums()) : undefined,
    get advance() {
      return advance();
    },
    get advanceEach() {
      return advanceEach();
    },
    get quantities() {
      return quantities();
    },
    get step() {
      return step();
    },
    get path() {
      return path();
    },
    get pathWithSensitivities() {
      return pathWithSensitivities();
    },
  };
}
