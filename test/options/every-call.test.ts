// Every public function with each of its options misspelt, missing, of the wrong type and out of range, and with wrong
// arguments before them: the call is refused and never taken in silence, the message names the option, and following
// its advice works.
import { afterAll, describe, expect, test } from "vitest";
import type { ArgumentKind } from "../../kernel-helpers/options/argument.js";
import type { Argument, FunctionSchema } from "../../kernel-helpers/options/function-schema.js";
import { checkCall } from "../../kernel-helpers/options/index.js";
import type { Field } from "../../kernel-helpers/options/option.js";
import { evaluate, exampleCall, publicFunction, refusal, schemas, scope } from "./calls.js";
import { outOfRange, unknownNames, wrongTypes } from "./wrong-values.js";

type Given = Readonly<Record<string, unknown>>;

const counts: Record<string, number> = {};
afterAll(() => {
  const all = Object.entries(counts).map(([kind, count]) => `${count} ${kind}`);
  console.log(`  ${schemas.length} functions: ${all.join(", ")}`);
});

/** A call that must be refused, with what it is wrong in; tells what was said. */
async function refused(
  kind: string,
  { name }: FunctionSchema,
  given: readonly unknown[],
): Promise<Error & { readonly code?: string }> {
  counts[kind] = (counts[kind] ?? 0) + 1;
  const error = await refusal(() => publicFunction(name)(...given));
  expect(error, `${name} was not refused`).toBeDefined();
  expect(error!.name, `${name}: ${error!.message}`).toBe("ModelError");
  return error!;
}

/** The options that a message says to write. */
function advice({ message }: Error): Given {
  if (/[Ll]eave `\w+` out/.test(message)) return {};
  const code = / Write `(.+?)`(?:\.| or less)/s.exec(message)?.[1];
  expect(code, message).toBeDefined();
  return evaluate(`{ ${code} }`) as Given;
}

/** An example's arguments, and its options without those that exclude an option. */
function example(
  schema: FunctionSchema,
  option: string,
): { readonly before: readonly unknown[]; readonly options: Given } {
  const call = exampleCall(schema);
  const excluded = (schema.options?.oneOf ?? []).filter((names) => names.includes(option)).flat();
  // A fit brings its own parameters.
  if (schema.options?.fields[option]?.of === "fit") excluded.push("parameters");
  const options = Object.entries((call[schema.takes.length] ?? {}) as Given);
  const before = call.slice(0, schema.takes.length);
  const { of = "" } = schema.options?.fields[option] ?? {};
  return {
    before: of === "" ? before : [scope[of], ...before.slice(1)],
    options: Object.fromEntries(options.filter(([name]) => name !== option && !excluded.includes(name))),
  };
}

const withOptions = schemas.filter(({ options }) => options !== undefined);
const named = (list: readonly FunctionSchema[]): [string, FunctionSchema][] =>
  list.map((schema) => [schema.name, schema]);
const optionsOf = ({ options }: FunctionSchema): [string, Field][] => Object.entries(options!.fields);

test.each(named(schemas))("%s takes the call that its messages give as an example", (_, schema) => {
  checkCall(schema.name, exampleCall(schema));
});

/** A value that is refused, by a message that names the option and gives another value that is not. */
async function refusedValue(
  kind: string,
  schema: FunctionSchema,
  option: string,
  value: unknown,
): Promise<void> {
  const { before, options } = example(schema, option);
  const error = await refused(kind, schema, [...before, { ...options, [option]: value }]);
  expect(error.code).toMatch(/^(option-(wrong|unknown|missing|too-large)|unknown-name)$/);
  expect(error.message).toMatch(new RegExp(`\`(rules\\.)?${option}[\`.\\[:]`));
  // What the rule does not have is tried apart.
  if (error.code === "unknown-name") return;
  const again = await refusal(() => checkCall(schema.name, [...before, { ...options, ...advice(error) }]));
  expect(again?.message ?? "", error.message).not.toMatch(new RegExp(`^Option \`${option}\``));
}

describe.each(named(withOptions))("%s", (_, schema) => {
  test("names an option that is misspelt, and the one that was meant", async () => {
    for (const [option, { example: code }] of optionsOf(schema)) {
      const { before, options } = example(schema, option);
      const misspelt = `${option}${option.at(-1)}`;
      const error = await refused("misspelt", schema, [
        ...before,
        { ...options, [misspelt]: evaluate(code) },
      ]);
      expect(error.code).toBe("option-unknown");
      expect(error.message).toContain(`Unknown option \`${misspelt}\``);
      expect(error.message).toMatch(new RegExp(`Did you mean [^?]*\`${option}\``));
    }
  });

  test("names an option that is missing, and what to type", async () => {
    const groups = schema.options!.oneOf ?? [];
    const needed = optionsOf(schema).filter(
      ([name, { need }]) => need === "required" || groups.flat().includes(name),
    );
    for (const [option] of needed) {
      const { before, options } = example(schema, option);
      const error = await refused("missing", schema, [...before, options]);
      expect(error.code).toBe("option-missing");
      expect(error.message).toContain(`\`${option}\``);
      checkCall(schema.name, [...before, { ...options, ...advice(error) }]);
    }
  });

  test.each([
    ["wrong type", wrongTypes],
    ["out of range", outOfRange],
  ] as const)("refuses a value of %s, and says what to type", async (kind, valuesOf) => {
    for (const [option, field] of optionsOf(schema))
      for (const value of valuesOf(field.kind)) await refusedValue(kind, schema, option, value);
  });

  test("names what the rule does not have", async () => {
    for (const [option, { kind }] of optionsOf(schema)) {
      // What a rule of the catalogue does not have is no error of a search through all of them.
      if (schema.name === "propose" && option !== "state") continue;
      const { before, options } = example(schema, option);
      for (const value of unknownNames(kind)) {
        const error = await refused("unknown name", schema, [...before, { ...options, [option]: value }]);
        expect(error.code).toBe("unknown-name");
        expect(error.message).toMatch(new RegExp(`^Option \`${option}[\`.\\[]`));
        expect(error.message).toContain("noSuchName");
      }
    }
  });

  test("refuses a size that no memory holds, and says which fits", async () => {
    for (const { option } of schema.sizes ?? []) {
      const { before, options } = example(schema, option);
      const error = await refused("too large", schema, [...before, { ...options, [option]: 1e12 }]);
      expect(error.code).toMatch(/^option-(too-large|wrong)$/);
      checkCall(schema.name, [...before, { ...options, ...advice(error) }]);
    }
  });

  test("refuses options that are no object, and too many arguments", async () => {
    const { before, options } = example(schema, "");
    for (const value of [12, "text", null, true, [1], () => 0, scope["fit"]])
      if (evaluate(`${JSON.stringify(value) ?? 0}`) !== undefined)
        expect((await refused("wrong argument", schema, [...before, value])).message).toContain(schema.name);
    await refused("wrong argument", schema, [...before, options, { more: 1 }]);
  });
});

/** Things that stand first in a call by mistake, by what they are. */
const mistaken: Readonly<Record<string, unknown>> = {
  nothing: undefined,
  null: null,
  number: 12,
  text: "no such thing",
  flag: true,
  list: [],
  object: {},
  function: () => 0,
  promise: Promise.resolve(1),
  rule: scope["rule"],
  fit: scope["fit"],
  fits: [scope["fit"], scope["second"]],
  observations: scope["observations"],
  forecast: scope["ahead"],
  simulation: scope["simulation"],
};

/** Which of them are right. */
function isRight(argument: Argument, what: string): boolean {
  if ("kind" in argument.takes)
    return what === "text"
      ? argument.takes.kind.is === "text"
      : argument.takes.kind.is === what || (what === "nothing" && argument.mayBeLeftOut === true);
  const right: Readonly<Partial<Record<ArgumentKind, readonly string[]>>> = {
    record: ["list", "object", "observations"],
    result: ["rule", "fit", "observations", "forecast", "simulation"],
    fits: ["fits", "list", "fit"],
  };
  return argument.takes.some((kind) => kind === "anything" || (right[kind] ?? [kind]).includes(what));
}

describe.each(named(schemas.filter(({ takes }) => takes.length > 0)))("%s", (_, schema) => {
  test("refuses what it does not work on, and says what to call", async () => {
    const call = exampleCall(schema);
    for (const [place, argument] of schema.takes.entries())
      for (const [what, value] of Object.entries(mistaken)) {
        if (isRight(argument, what)) continue;
        const error = await refused(
          "wrong argument",
          schema,
          call.map((own, i) => (i === place ? value : own)),
        );
        expect(error.code).toBe("argument-wrong");
        expect(error.message).toContain(`\`${schema.name}`);
      }
  });

  test("is never a raw error, whatever stands first", async () => {
    for (const value of Object.values(mistaken)) {
      const error = await refusal(() => publicFunction(schema.name)(value));
      if (error !== undefined) expect(error.name, error.message).toBe("ModelError");
    }
  });
});
