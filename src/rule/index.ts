export type { NamedClosedForm, NamedEquilibrium, NamedQuantity, NamedRule } from "./catalogue/named-rule.js";
export { type RuleCatalogue, rules } from "./catalogue/rules.js";
export { shortNames } from "./catalogue/short-names.js";
export { compileRule, interpretRule } from "./code/compile-rule.js";
export type { CompiledRule, PathSums, StepSums } from "./compiled-rule.js";
export { encloseStep, type FixedValues, type StepEnclosure } from "./enclose-step.js";
export { eventOrder } from "./event-order.js";
export { explainFailure, type StepArguments, type StepFailure } from "./explain-failure.js";
export { type Formula, formula } from "./formula.js";
export type { RuleFunction } from "./functions.js";
export type { Algebra } from "./graph/evaluate-over.js";
export type { Interval } from "./graph/interval.js";
export type { Operator } from "./graph/node.js";
export { dependsOnPeriod, inputOffsets } from "./input-offsets.js";
export { linearInParameters } from "./linear-in-parameters.js";
export { type NonsmoothCall, type NonsmoothCalls, nonsmoothCalls } from "./nonsmooth-calls.js";
export { quantitiesAt } from "./quantities-at.js";
export { recurrence } from "./recurrence.js";
export type { Bounds, RecurrenceOptions } from "./recurrence-options.js";
export type { ProcessNoise, Rule } from "./rule.js";
export { ruleLabel, ruleLines } from "./rule-label.js";
export { type RuleLanguage, ruleLanguage } from "./rule-language.js";
export { ruleText } from "./rule-text.js";
export { type BoundBehaviour, type StateBound, stateBounds, withinBound } from "./state-bounds.js";
export {
  intervalAlgebra,
  isLinearInStates,
  type StepArgumentsOver,
  type StepOver,
  stepOver,
} from "./step-over.js";
export { ruleTex } from "./tex/rule-tex.js";
export { unitClash } from "./units/unit-clash.js";
