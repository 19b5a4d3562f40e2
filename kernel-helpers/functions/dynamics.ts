import * as engine from "../../src/dynamics/index.js";
import { frozenCopy } from "../../src/numeric/index.js";
import type { Rule } from "../../src/rule/index.js";
import { showing } from "../tables/index.js";
import { showAttractor } from "./show-attractor.js";
import * as long from "./show-long-run.js";
import * as steps from "./show-steps.js";
import { shownTogether } from "./shown-together.js";

/** A result of the engine that shows itself as given parts. */
const shown = <T extends object>(result: T, parts: (result: T) => readonly unknown[]): T =>
  showing(result, () => shownTogether(parts(result)));

/**
 * Runs a rule from its first value, without random change; the result shows the path and its numbers, quantities
 * inside the period among them.
 *
 * @throws {ModelError} where a parameter, a first value or an input is missing.
 * @example trajectory(recurrence("N[t+1] = R*N"), { parameters: { R: 2 }, initial: { N: 3 }, periods: 2 }).values.N; // [3, 6, 12]
 */
export const trajectory = (rule: Rule, options: engine.TrajectoryOptions): engine.Trajectory =>
  shown(engine.trajectory(rule, frozenCopy(options)), steps.showPath);

/**
 * Runs a rule in exact fractions; the result shows them.
 *
 * @throws {ModelError} `no-rational-value` where a function has no exact value.
 * @example exactTrajectory(recurrence("F[t+1] = F + F[t-1]"), { initial: { F: [0, 1] }, periods: 29 }).values.F[29]; // "832040"
 */
export const exactTrajectory = (rule: Rule, options: engine.ExactTrajectoryOptions): engine.ExactTrajectory =>
  shown(engine.exactTrajectory(rule, frozenCopy(options)), steps.showExactPath);

/**
 * Finds the values after t periods as a formula; the result shows it with its roots, how well it agrees with
 * stepping, and how far computer numbers keep their digits.
 *
 * @throws {ModelError} `no-closed-form` | `outside-range`.
 * @example closedForm(rules.affine(), { parameters: { a: 0.5, b: 1 }, initial: { x: 0 } }).method; // "named"
 */
export const closedForm = (rule: Rule, options: engine.ClosedFormOptions = {}): engine.ClosedForm =>
  shown(engine.closedForm(rule, frozenCopy(options)), steps.showClosedForm);

/**
 * Finds the values that a rule leaves as they are, all of them in a range; the result shows each with its verdict.
 *
 * @example equilibria(recurrence("ΔN = r*N*(1 - N/K)"), { parameters: { r: 0.5, K: 1000 } }).points.length; // 2
 */
export const equilibria = (rule: Rule, options: engine.EquilibriaOptions = {}): engine.Equilibria =>
  shown(engine.equilibria(rule, frozenCopy(options)), long.showEquilibria);

/**
 * Finds all cycles of a period in a range; the result shows them with their multipliers and verdicts.
 *
 * @example cycles(recurrence("x[t+1] = 3.2*x*(1 - x)"), { period: 2, range: [0, 1] }).cycles.length; // 1
 */
export const cycles = (rule: Rule, options: engine.CyclesOptions): engine.Cycles =>
  shown(engine.cycles(rule, frozenCopy(options)), long.showCycles);

/**
 * Follows a stable cycle while a parameter is varied and finds where it loses its hold.
 *
 * @example bifurcations(recurrence("x[t+1] = r*x*(1 - x)"), { vary: "r", range: [2.8, 3.3], initial: 0.3 }).places[0].kind; // "flip"
 */
export const bifurcations = (rule: Rule, options: engine.BifurcationsOptions): engine.Bifurcations =>
  shown(engine.bifurcations(rule, frozenCopy(options)), long.showBifurcations);

/**
 * Measures how fast small gaps grow or shrink along a path; the result shows the value with its interval and how it
 * settled.
 *
 * @example lyapunovExponent(recurrence("x[t+1] = 2.5*x*(1 - x)"), { initial: { x: 0.3 }, periods: 3000 }).verdict; // "not chaotic"
 */
export const lyapunovExponent = (
  rule: Rule,
  options: engine.LyapunovExponentOptions = {},
): engine.LyapunovExponent => shown(engine.lyapunovExponent(rule, frozenCopy(options)), long.showExponent);

/**
 * Tells how far ahead single values can be foretold from a first value known to within an error.
 *
 * @example predictionHorizon(recurrence("x[t+1] = 2.5*x*(1 - x)"), { initial: { x: 0.3 }, error: 0.001, tolerance: 0.1 }).periods; // Infinity
 */
export const predictionHorizon = (
  rule: Rule,
  options: engine.PredictionHorizonOptions,
): engine.PredictionHorizon => shown(engine.predictionHorizon(rule, frozenCopy(options)), long.showHorizon);

/**
 * Where a rule goes in the long run, against one of its parameters; the result shows the diagram, with the estimate
 * and its interval marked.
 *
 * @example attractor(recurrence("x[t+1] = r*x*(1 - x)"), { vary: "r", values: [2, 3, 4], periods: 2, initial: 0.3 }).perColumn; // 2
 */
export const attractor = (rule: Rule, options: engine.AttractorOptions): engine.Attractor =>
  shown(engine.attractor(rule, frozenCopy(options)), showAttractor);

/**
 * Next value against present value with the steps of a path between; the result shows the web.
 *
 * @example cobweb(recurrence("x[t+1] = 0.5*x + 1"), { initial: { x: 0 }, periods: 2 }).web.y; // [0, 1, 1, 1.5, 1.5]
 */
export const cobweb = (rule: Rule, options: engine.CobwebOptions): engine.Cobweb =>
  shown(engine.cobweb(rule, frozenCopy(options)), long.showCobweb);

/**
 * Sorts first values by where they end up, with the borders and the chance of each.
 *
 * @example basins(rules.allee(), { parameters: { r: 0.2, K: 100, A: 20 }, range: [0, 110] }).borders.length; // 1
 */
export const basins = (rule: Rule, options: engine.BasinsOptions): engine.Basins =>
  shown(engine.basins(rule, frozenCopy(options)), long.showBasins);

/**
 * The long run of a matrix rule: dominant root, stable structure, reproductive values, sensitivities, elasticities.
 *
 * @example matrixGrowth(rules.ages({ ages: 3 }), { parameters: { f1: 0, f2: 4, f3: 3, s1: 0.5, s2: 0.25 } }).dominant; // 1.5
 */
export const matrixGrowth = (rule: Rule, setting: engine.HeldSetting = {}): engine.MatrixGrowth =>
  shown(engine.matrixGrowth(rule, frozenCopy(setting)), steps.showMatrixGrowth);
