import type { RuleGraph } from "../graph/rule-graph.js";

export const lines = (count: number, line: (index: number) => string): string =>
  Array.from({ length: count }, (_, index) => line(index)).join("\n");

/** Declares the parameters and input columns that every generated function begins with. */
export const readArguments = (rule: RuleGraph): string =>
  [
    lines(rule.parameters, (i) => `const c${i} = parameters[${i}];`),
    lines(rule.inputs, (i) => `const u${i} = inputs[${i}];`),
  ].join("\n");
