import { ModelError } from "../../numeric/index.js";
import { ruleError, unknownNameError } from "../errors.js";
import { reservedWords, ruleFunctions } from "../functions.js";
import type { Statement } from "../syntax/expression.js";
import type { Span } from "../syntax/token.js";
import type { Declarations } from "./checked-rule.js";

/** The names of one rule by role, filled while its lines are read in order. */
export interface Names {
  readonly text: string;
  readonly states: ReadonlySet<string>;
  readonly inputs: ReadonlySet<string>;
  /** Declared parameters, or undefined when every free name is one. */
  readonly declared: ReadonlySet<string> | undefined;
  /** By quantity: the number of the line that sets it. */
  readonly quantityLines: ReadonlyMap<string, number>;
  /** In order of first appearance. */
  readonly parameters: Map<string, Span>;
  readonly usedInputs: Set<string>;
  /** Largest lag read, by state. */
  readonly lags: Map<string, number>;
}

function setTwiceError(text: string, place: Span, name: string): Error {
  const wrong = `"${name}" is set by two lines.`;
  return ruleError("set-twice", text, place, wrong, "Remove one of the lines, or use another name in it.");
}

function setDeclaredNameError(text: string, place: Span, name: string, kind: string): Error {
  const wrong = `"${name}" is declared as ${kind}, but this line sets it.`;
  return ruleError(
    "set-twice",
    text,
    place,
    wrong,
    `Remove it from \`${kind === "an input" ? "inputs" : "parameters"}\`.`,
  );
}

const reservedNameError = (name: string): Error =>
  new ModelError("reserved-name", `"${name}" is a reserved word of the rule language. Choose another name.`, {
    name,
  });

const twoRolesError = (name: string): Error =>
  new ModelError(
    "two-roles",
    `"${name}" is listed in both \`parameters\` and \`inputs\`. Remove it from one of them.`,
    {
      name,
    },
  );

/** Divides the names that lines set into states and quantities. */
export function namesOf(text: string, statements: readonly Statement[], declared: Declarations): Names {
  const states = new Set<string>();
  const quantityLines = new Map<string, number>();
  const inputs = new Set(declared.inputs);
  for (const name of [...inputs, ...(declared.parameters ?? [])]) {
    if (reservedWords.has(name)) throw reservedNameError(name);
    if (inputs.has(name) && declared.parameters?.includes(name)) throw twoRolesError(name);
  }
  statements.forEach(({ kind, name, nameAt }, line) => {
    if (states.has(name) || quantityLines.has(name)) throw setTwiceError(text, nameAt, name);
    if (inputs.has(name)) throw setDeclaredNameError(text, nameAt, name, "an input");
    if (declared.parameters?.includes(name)) throw setDeclaredNameError(text, nameAt, name, "a parameter");
    if (kind === "quantity") quantityLines.set(name, line);
    else states.add(name);
  });
  return {
    text,
    states,
    inputs,
    declared: declared.parameters && new Set(declared.parameters),
    quantityLines,
    parameters: new Map(),
    usedInputs: new Set(),
    lags: new Map(),
  };
}

/** The error for a name that is not declared. */
export function undeclaredNameError(names: Names, place: Span, name: string): Error {
  const others = [...names.states, ...names.quantityLines.keys(), ...names.inputs];
  const parameters = [...(names.declared ?? [])];
  const functions = ruleFunctions.map((one) => one.name);
  return unknownNameError(names.text, place, name, { parameters, others, functions });
}
