import type { Advance, CompiledRule } from "../compiled-rule.js";
import type { RuleGraph } from "../graph/rule-graph.js";
import { stepJacobian } from "../graph/step-jacobian.js";
import { graphEvaluator, type ReadNode } from "./graph-evaluator.js";

/** Sensitivities [states, unknowns] after a step, from those before it and the slopes of the step. */
function nextSensitivities(rule: RuleGraph, read: ReadNode, before: Float64Array, after: Float64Array): void {
  const { byState, byParameter } = stepJacobian(rule);
  const zero = rule.graph.number(0);
  const unknowns = rule.parameters + rule.states;
  for (let cell = 0; cell < after.length; cell++) {
    const slot = Math.floor(cell / unknowns);
    const unknown = cell % unknowns;
    let sum = 0;
    byState[slot]!.forEach((slope, k) => {
      if (slope !== zero) sum += read(slope) * before[k * unknowns + unknown]!;
    });
    const own = byParameter[slot]![unknown];
    after[cell] = own === undefined ? sum : sum + read(own);
  }
}

/** The rule as plain loops over its graph, for hosts that forbid generated code. */
export function interpretGraph(rule: RuleGraph): CompiledRule {
  const width = rule.states;
  const evaluateStep = graphEvaluator(rule.next);
  const step: CompiledRule["step"] = (state, parameters, inputs, t, next) => {
    const read = evaluateStep({ state, parameters, inputs, t });
    rule.next.forEach((node, slot) => {
      next[slot] = read(node);
    });
  };
  const path: CompiledRule["path"] = (initial, parameters, inputs, from, periods, values) => {
    const state = initial.slice(0, width);
    values.set(state);
    for (let i = 1; i <= periods; i++) {
      step(state, parameters, inputs, from + i - 1, state);
      values.set(state, i * width);
    }
  };
  return {
    step,
    path,
    advance: interpretAdvance(rule, step, true),
    advanceEach: interpretAdvance(rule, step, false),
    quantities: interpretQuantities(rule),
    pathWithSensitivities: interpretSensitivities(rule),
    pathSums: undefined,
    stepSums: undefined,
  };
}

function interpretAdvance(rule: RuleGraph, step: CompiledRule["step"], shared: boolean): Advance {
  return (present, first, last, parameters, inputs, t) => {
    for (let path = first; path < last; path++) {
      const state = present.subarray(path * rule.states, (path + 1) * rule.states);
      const from = shared ? 0 : path * rule.parameters;
      step(state, parameters.subarray(from, from + rule.parameters), inputs, t, state);
    }
  };
}

function interpretQuantities(rule: RuleGraph): CompiledRule["quantities"] {
  const evaluate = graphEvaluator(rule.quantities);
  return (present, first, last, parameters, stride, inputs, t, out) => {
    for (let path = first; path < last; path++) {
      const state = present.subarray(path * rule.states, (path + 1) * rule.states);
      const own = parameters.subarray(path * stride, path * stride + rule.parameters);
      const read = evaluate({ state, parameters: own, inputs, t });
      rule.quantities.forEach((node, k) => {
        out[k]![path] = read(node);
      });
    }
  };
}

function interpretSensitivities(rule: RuleGraph): CompiledRule["pathWithSensitivities"] {
  const width = rule.states;
  const table = width * (rule.parameters + width);
  const { byState, byParameter } = stepJacobian(rule);
  const evaluateAll = graphEvaluator([...rule.next, ...byState.flat(), ...byParameter.flat()]);
  return (initial, parameters, inputs, from, periods, values, sensitivities) => {
    const state = initial.slice(0, width);
    values.set(state);
    sensitivities.fill(0, 0, table);
    for (let slot = 0; slot < width; slot++) {
      sensitivities[slot * (rule.parameters + width) + rule.parameters + slot] = 1;
    }
    for (let i = 1; i <= periods; i++) {
      const read = evaluateAll({ state, parameters, inputs, t: from + i - 1 });
      const before = sensitivities.subarray((i - 1) * table, i * table);
      nextSensitivities(rule, read, before, sensitivities.subarray(i * table, (i + 1) * table));
      rule.next.forEach((node, slot) => {
        state[slot] = read(node);
      });
      values.set(state, i * width);
    }
  };
}
