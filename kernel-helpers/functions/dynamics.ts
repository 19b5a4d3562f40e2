import * as engine from "../../src/dynamics/index.js";
import type { Fit, GroupFit } from "../../src/estimate/index.js";
import { frozenCopy } from "../../src/numeric/index.js";
import type { Rule } from "../../src/rule/index.js";
import { checkCall } from "../options/index.js";
import { runShown } from "../progress/index.js";
import { showing } from "../tables/index.js";
import {
  attractorValues,
  fitNotes,
  fittedStart,
  groupOf,
  type OptionsFor,
  presentValues,
  type ResultFor,
  type Subject,
  shownNotes,
} from "./fit-values.js";
import { showAttractor } from "./show-attractor.js";
import * as long from "./show-long-run.js";
import * as steps from "./show-steps.js";
import { shownTogether } from "./shown-together.js";

/** One question about what a rule does. */
interface Question<Result> {
  readonly name: string;
  readonly ask: (rule: Rule, options: never) => Result;
  readonly show: (result: Result) => readonly unknown[];
  /** What a fit brings besides its parameters. */
  readonly bring?: (fit: Fit, group: GroupFit, options: Given) => Given;
}

type Given = Readonly<Record<string, unknown>>;

/** Asks a question of a rule, or of a fit at its estimates. */
type Ask<Options, Result> = <Asked extends Subject>(
  subject: Asked,
  options: OptionsFor<Asked, Options>,
) => ResultFor<Asked, Result>;

/** The same where every option may be left out. */
type AskFreely<Options, Result> = <Asked extends Subject>(
  subject: Asked,
  options?: OptionsFor<Asked, Options>,
) => ResultFor<Asked, Result>;

const asking =
  <Options, Result extends object>(about: Question<Result>): AskFreely<Options, Result> =>
  <Asked extends Subject>(...given: readonly [Asked, OptionsFor<Asked, Options>?]) =>
    asked(about, given) as ResultFor<Asked, Result>;

/** The answer, which shows itself; that of a fit says which estimates were taken. */
function asked<Result extends object>(
  { name: question, ask, show, bring }: Question<Result>,
  given: readonly unknown[],
): object {
  const [subject, options = {}, ...more] = given as readonly [Subject, Given?, ...unknown[]];
  if (subject?.kind !== "fit" || typeof options !== "object" || options === null) {
    checkCall(question, given);
    const result = ask(subject as Rule, frozenCopy(options) as never);
    return showing(result, () => shownTogether(show(result)));
  }
  const { group: name } = options;
  const group = groupOf(subject, typeof name === "string" ? name : undefined);
  const { parameters: own = {} } = options;
  const all = {
    ...bring?.(subject, group, options),
    ...options,
    parameters: typeof own === "object" ? { ...group.parameters, ...own } : own,
  };
  checkCall(question, [subject, all, ...more]);
  const notes = fitNotes(subject, group);
  const result = { ...ask(subject.rule, frozenCopy(all) as never), fit: subject, notes };
  return showing(result, () => shownTogether([...show(result), shownNotes(notes)]));
}

const withInitial = (fit: Fit, group: GroupFit): Given => ({
  initial: fittedStart(fit, group).initial,
});

/**
 * Runs a rule from its first value, without random change; the result shows the path and its numbers, quantities
 * inside the period among them. Of a fit, the trajectory at its estimates, from the first period of its record.
 *
 * @throws {ModelError} where a parameter, a first value or an input is missing.
 * @example trajectory(recurrence("N[t+1] = R*N"), { parameters: { R: 2 }, initial: { N: 3 }, periods: 2 }).values.N; // [3, 6, 12]
 */
export const trajectory: Ask<engine.TrajectoryOptions, engine.Trajectory> = asking({
  name: "trajectory",
  ask: engine.trajectory,
  show: steps.showPath,
  bring: (fit, group) => {
    const { initial, period } = fittedStart(fit, group);
    return { initial, record: fit, startsAt: period, ...(group.group !== "" && { group: group.group }) };
  },
});

/**
 * Runs a rule in exact fractions; the result shows them. Of a fit, at its estimates as the decimals they print as.
 *
 * @throws {ModelError} `no-rational-value` where a function has no exact value.
 * @example exactTrajectory(recurrence("F[t+1] = F + F[t-1]"), { initial: { F: [0, 1] }, periods: 29 }).values.F[29]; // "832040"
 */
export const exactTrajectory: Ask<engine.ExactTrajectoryOptions, engine.ExactTrajectory> = asking({
  name: "exactTrajectory",
  ask: engine.exactTrajectory,
  show: steps.showExactPath,
  bring: withInitial,
});

/**
 * Finds the values after t periods as a formula; the result shows it with its roots, how well it agrees with
 * stepping, and how far computer numbers keep their digits.
 *
 * @throws {ModelError} `no-closed-form` | `outside-range`.
 * @example closedForm(rules.affine(), { parameters: { a: 0.5, b: 1 }, initial: { x: 0 } }).method; // "named"
 */
export const closedForm: AskFreely<engine.ClosedFormOptions, engine.ClosedForm> = asking({
  name: "closedForm",
  ask: engine.closedForm,
  show: steps.showClosedForm,
  bring: withInitial,
});

/**
 * Finds the values that a rule leaves as they are, all of them in a range; the result shows each with its verdict.
 *
 * @example equilibria(recurrence("ΔN = r*N*(1 - N/K)"), { parameters: { r: 0.5, K: 1000 } }).points.length; // 2
 */
export const equilibria: AskFreely<engine.EquilibriaOptions, engine.Equilibria> = asking({
  name: "equilibria",
  ask: engine.equilibria,
  show: long.showEquilibria,
});

/**
 * Finds all cycles of a period in a range; the result shows them with their multipliers and verdicts.
 *
 * @example cycles(recurrence("x[t+1] = 3.2*x*(1 - x)"), { period: 2, range: [0, 1] }).cycles.length; // 1
 */
export const cycles: Ask<engine.CyclesOptions, engine.Cycles> = asking({
  name: "cycles",
  ask: engine.cycles,
  show: long.showCycles,
});

/**
 * Follows a stable cycle while a parameter is varied and finds where it loses its stability.
 *
 * @example bifurcations(recurrence("x[t+1] = r*x*(1 - x)"), { vary: "r", range: [2.8, 3.3], initial: 0.3 }).places[0].kind; // "flip"
 */
export const bifurcations: Ask<engine.BifurcationsOptions, engine.Bifurcations> = asking({
  name: "bifurcations",
  ask: engine.bifurcations,
  show: long.showBifurcations,
  bring: (fit: Fit, group: GroupFit): Given => ({ initial: presentValues(fit, group) }),
});

/**
 * Measures how fast small differences grow or shrink along a path; the result shows the value with its interval and
 * how it settled.
 *
 * @example lyapunovExponent(recurrence("x[t+1] = 2.5*x*(1 - x)"), { initial: { x: 0.3 }, periods: 3000 }).verdict; // "not chaotic"
 */
export const lyapunovExponent: AskFreely<engine.LyapunovExponentOptions, engine.LyapunovExponent> = asking({
  name: "lyapunovExponent",
  ask: (rule: Rule, own: engine.LyapunovExponentOptions): engine.LyapunovExponent =>
    runShown("Lyapunov exponent", own, (shown) => engine.lyapunovExponent(rule, shown)),
  show: long.showExponent,
  bring: withInitial,
});

/**
 * Tells how far ahead single values can be predicted from a first value known to within an error.
 *
 * @example predictionHorizon(recurrence("x[t+1] = 2.5*x*(1 - x)"), { initial: { x: 0.3 }, error: 0.001, tolerance: 0.1 }).periods; // Infinity
 */
export const predictionHorizon: Ask<engine.PredictionHorizonOptions, engine.PredictionHorizon> = asking({
  name: "predictionHorizon",
  ask: (rule: Rule, own: engine.PredictionHorizonOptions): engine.PredictionHorizon =>
    runShown("Prediction horizon", own, (shown) => engine.predictionHorizon(rule, shown)),
  show: long.showHorizon,
  bring: withInitial,
});

/**
 * Where a rule goes in the long run, against one of its parameters; the result shows the diagram, with the estimate
 * and its interval marked.
 *
 * @example attractor(recurrence("x[t+1] = r*x*(1 - x)"), { vary: "r", values: [2, 3, 4], periods: 2, initial: 0.3 }).perColumn; // 2
 */
export const attractor: Ask<engine.AttractorOptions, engine.Attractor> = asking({
  name: "attractor",
  ask: (rule: Rule, own: engine.AttractorOptions): engine.Attractor =>
    runShown("Attractor", own, (shown) => engine.attractor(rule, shown)),
  show: showAttractor,
  bring: attractorValues,
});

/**
 * Next value against present value with the steps of a path between; the result shows the web.
 *
 * @example cobweb(recurrence("x[t+1] = 0.5*x + 1"), { initial: { x: 0 }, periods: 2 }).web.y; // [0, 1, 1, 1.5, 1.5]
 */
export const cobweb: Ask<engine.CobwebOptions, engine.Cobweb> = asking({
  name: "cobweb",
  ask: engine.cobweb,
  show: long.showCobweb,
  bring: withInitial,
});

/**
 * Sorts first values by where they end up, with the borders and the chance of each.
 *
 * @example basins(rules.allee(), { parameters: { r: 0.2, K: 100, A: 20 }, range: [0, 110] }).borders.length; // 1
 */
export const basins: Ask<engine.BasinsOptions, engine.Basins> = asking({
  name: "basins",
  ask: (rule: Rule, own: engine.BasinsOptions): engine.Basins =>
    runShown("Basins", own, (shown) => engine.basins(rule, shown)),
  show: long.showBasins,
});

/**
 * The long run of a matrix rule: dominant root, stable structure, reproductive values, sensitivities, elasticities.
 *
 * @example matrixGrowth(rules.ages({ ages: 3 }), { parameters: { f1: 0, f2: 4, f3: 3, s1: 0.5, s2: 0.25 } }).dominant; // 1.5
 */
export const matrixGrowth: AskFreely<engine.HeldSetting, engine.MatrixGrowth> = asking({
  name: "matrixGrowth",
  ask: engine.matrixGrowth,
  show: steps.showMatrixGrowth,
});
