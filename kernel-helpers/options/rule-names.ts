import type { Observations } from "../../src/record/index.js";
import type { Rule } from "../../src/rule/index.js";
import { isPlain } from "./written.js";

/** What a name in an option must be a name of. */
export type Role = "parameter" | "state" | "input" | "measured" | "free" | "varied" | "levelled";

export const roleWords: Readonly<Record<Role, string>> = {
  parameter: "parameter",
  state: "state",
  input: "input",
  measured: "state or quantity",
  free: "parameter or initial state",
  varied: "parameter, first value or input",
  levelled: "parameter or first value",
};

/** The names of a role; undefined where they are not known yet. */
export type Names = (role: Role) => readonly string[] | undefined;

/** The names that the options of a call may speak of, by the first thing that the call is about. */
export function namesOf(subject: unknown, options: Readonly<Record<string, unknown>>): Names {
  const rule = ruleOf(subject);
  if (rule !== undefined) return (role) => ofRule(rule, options)[role];
  const { kind, states = [] } = (subject ?? {}) as Partial<Observations>;
  return (role) => (kind === "observations" && role === "state" ? states.map(({ name }) => name) : undefined);
}

interface Carrier {
  readonly kind?: unknown;
  readonly rule?: Rule;
  readonly fit?: { readonly rule?: Rule };
}

/** The rule of a rule, a fit, fits, a forecast or a simulation. */
function ruleOf(subject: unknown): Rule | undefined {
  const carrier = (Array.isArray(subject) ? subject[0] : subject) as Carrier | undefined;
  const rule = carrier?.kind === "rule" ? (carrier as Rule) : (carrier?.rule ?? carrier?.fit?.rule);
  return rule?.kind === "rule" ? rule : undefined;
}

function ofRule(
  { parameters, states, quantities, inputs, lags }: Rule,
  { factor }: Readonly<Record<string, unknown>>,
): Readonly<Record<Role, readonly string[]>> {
  const past = (state: string): number => lags.filter((kept) => kept.state === state).length;
  const initial = states.flatMap((state) =>
    Array.from({ length: past(state) + 1 }, (_, place) => `${state}[${place}]`),
  );
  const factors = isPlain(factor) ? Object.values(factor).map(String) : [];
  return {
    parameter: parameters,
    state: states,
    input: inputs,
    measured: [...states, ...quantities],
    free: [...parameters, ...states, ...initial, ...factors],
    levelled: [...parameters, ...initial],
    varied: [...parameters, ...initial, ...states, ...inputs],
  };
}
