import { type Term, termsOf } from "./term.js";

const term = termsOf("general");

/** Terms of rules, records and long-run behaviour. */
export const dynamicsTerms: readonly Term[] = [
  term("attractor", "Set of values that trajectories approach: an equilibrium, a cycle or a chaotic set.", {
    related: ["basin of attraction", "chaos"],
  }),
  term("basin of attraction", "Initial values from which trajectories approach the same attractor.", {
    otherNames: ["basin", "basins"],
    related: ["attractor"],
  }),
  term("bifurcation", "Parameter value at which the number or stability of equilibria or cycles changes.", {
    otherNames: ["bifurcations"],
    related: ["multiplier", "equilibrium"],
  }),
  term("chaos", "Trajectories that stay bounded but diverge exponentially from close initial values.", {
    formula: "Lyapunov exponent > 0",
    related: ["Lyapunov exponent", "prediction horizon"],
  }),
  term("closed form", "Formula for the value after t periods.", {
    otherNames: ["closedForm"],
    related: ["trajectory"],
  }),
  term("cobweb plot", "Picture of a trajectory as steps between the curve of a rule and the diagonal.", {
    otherNames: ["cobweb"],
    related: ["equilibrium"],
  }),
  term("cycle", "Values that repeat after k periods.", {
    otherNames: ["cycles", "periodic orbit"],
    related: ["multiplier", "equilibrium"],
  }),
  term("equilibrium", "Value that a rule leaves unchanged.", {
    otherNames: ["equilibria", "fixed point", "steady state"],
    formula: "x = f(x)",
    unit: "unit of the state",
    mistakenFor: { "carrying capacity": "an equilibrium can be unstable" },
    related: ["multiplier", "stable"],
  }),
  term("exact trajectory", "Trajectory in exact fractions, without rounding (`exactTrajectory`).", {
    otherNames: ["exactTrajectory"],
    related: ["trajectory"],
  }),
  term("gap", "One or more missing periods. Pairs across a gap count as multi-step pairs.", {
    related: ["multi-step pair"],
  }),
  term("input", "Value that is recorded by period and read by a rule, such as a payment or a catch.", {
    otherNames: ["inputs", "driver"],
    mistakenFor: { parameter: "a parameter has one value for all periods" },
    related: ["plan", "state"],
  }),
  term("lag of a rule", "Number of periods back at which a value is read: N[t-2] has lag 2.", {
    otherNames: ["lags"],
    unit: "periods",
    mistakenFor: { lag: "in cultures, the time before growth starts" },
    related: ["state"],
  }),
  term(
    "Lyapunov exponent",
    "Mean growth of the logarithm of small differences between trajectories. Positive means chaos.",
    {
      otherNames: ["lyapunovExponent"],
      formula: "mean of ln|f'(x[t])|",
      unit: "1/period",
      related: ["chaos", "prediction horizon"],
    },
  ),
  term(
    "multiplier",
    "Slope of a rule at an equilibrium, or of k steps along a cycle; for several states an eigenvalue.",
    {
      otherNames: ["eigenvalue"],
      formula: "f'(x*); stable when |f'(x*)| < 1",
      mistakenFor: { "multiplier per period": "a growth factor between two values" },
      related: ["stable", "equilibrium"],
    },
  ),
  term("period", "Unit of time of a rule: one step. All rates are per period.", {
    otherNames: ["step"],
    mistakenFor: { "period of a cycle": "the number of steps after which a cycle repeats" },
    related: ["periods"],
  }),
  term("quantity", "Value computed within a period, such as the interest of a month.", {
    related: ["state", "rule"],
  }),
  term("recurrence", "Rule that gives the next value from the present one.", {
    otherNames: ["difference equation", "rule"],
    formula: "x[t+1] = f(x[t])",
    related: ["state", "parameter", "trajectory"],
  }),
  term("stable", "An equilibrium or cycle that trajectories from close values approach.", {
    otherNames: ["stability", "unstable"],
    formula: "modulus of every multiplier < 1",
    mistakenFor: { constant: "stable equilibria can be approached with oscillations" },
    related: ["multiplier"],
  }),
  term("state", "Value that a rule carries from period to period.", {
    otherNames: ["states"],
    related: ["initial state", "parameter", "input"],
  }),
  term("toPeriods", "Aggregates the rows of a record to periods: sums, means or last values.", {
    related: ["period"],
  }),
  term("trajectory", "Values that a rule produces period by period.", {
    otherNames: ["path", "orbit"],
    related: ["exact trajectory", "simulation"],
  }),
];
