import { expect, test } from "vitest";
import { trajectory } from "../../src/dynamics/index.js";
import { compileRule, recurrence } from "../../src/rule/index.js";

/** Each would reach the host program if any text were ever run, or looked up on an object. */
const attacks = [
  "N[t+1] = constructor",
  "N[t+1] = constructor(N)",
  'N[t+1] = constructor("return process")()',
  "N[t+1] = N.constructor.constructor",
  "N[t+1] = exp.constructor(1)",
  "N[t+1] = __proto__",
  "N[t+1] = __proto__(N)",
  "N[t+1] = prototype",
  "N[t+1] = toString(N)",
  "N[t+1] = valueOf()",
  "N[t+1] = hasOwnProperty(N)",
  "N[t+1] = globalThis(N)",
  "N[t+1] = process.exit(1)",
  "N[t+1] = require(1)",
  "N[t+1] = eval(1)",
  "N[t+1] = Function(1)",
  "N[t+1] = `\u0024{N}`",
  "N[t+1] = \u0024{process}",
  'N[t+1] = "text"',
  "N[t+1] = 'text'",
  "N[t+1] = /re/",
  "N[t+1] = N /* hidden */",
  "N[t+1] = N // hidden",
  "N[t+1] = (x => x)(N)",
  "N[t+1] = [N]",
  "N[t+1] = {N}",
  "N[t+1] = N; process.exit()",
  "N[t+1] = N, N",
  "N[t+1] = N++",
  "N[t+1] = N = 3",
  "N[t+1] = new N",
  "N[t+1] = N ? 1 : 2",
  "N[t+1] = N?.x",
  "N[t+1] = @N",
  "N[t+1] = N[0]",
  "N[t+1] = N[constructor]",
  "N[t+1] = N[t-1e9]",
  "N[t+1] = N[t-0.5]",
  "N[t+1] = \\u0065val(1)",
  "N[t+1] = ｅval(1)",
  "N[t+1] = ехр(N)", // the three letters are Cyrillic
  "N[t+1] = N\u2028process",
  "N[t+1] = N\u0000",
  "constructor[t+1] = 1",
  "__proto__[t+1] = 1",
  "__proto__ = 1\nN[t+1] = N",
  "exp[t+1] = 1",
  "t[t+1] = 1",
];

test.each(attacks)("%s is an error", (text) => {
  expect(() => recurrence(text)).toThrow(expect.objectContaining({ name: "ModelError" }));
});

test.each(["constructor", "__proto__", "prototype", "t", "exp"])("%s cannot be declared", (name) => {
  expect(() => recurrence("N[t+1] = N", { inputs: [name] })).toThrow(
    expect.objectContaining({ name: "ModelError" }),
  );
  expect(() => recurrence("N[t+1] = N", { parameters: [name] })).toThrow(
    expect.objectContaining({ name: "ModelError" }),
  );
});

const hostNames = [
  "process",
  "globalThis",
  "eval",
  "arguments",
  "this",
  "await",
  "Math",
  "s0",
  "c1",
  "v3",
  "toString",
  "valueOf",
  "hasOwnProperty",
];

test.each(hostNames)("%s is a parameter like any other", (name) => {
  const rule = recurrence(`N[t+1] = ${name}*N`);
  expect(rule.parameters).toEqual([name]);
  const run = trajectory(rule, { parameters: { [name]: 2 }, initial: { N: 1 }, periods: 3 });
  expect([...run.values["N"]!]).toEqual([1, 2, 4, 8]);
});

test("generated functions hold no name of the text", () => {
  const rule = recurrence("secret1 = alpha7*N\nN[t+1] = secret1 + beta7*u", { inputs: ["u"] });
  const { step, path: whole, pathWithSensitivities } = compileRule(rule);
  for (const made of [step, whole, pathWithSensitivities]) {
    expect(made.toString()).not.toMatch(/secret1|alpha7|beta7|\bN\b/u);
  }
});

test("values handed in under inherited names do not count as given", () => {
  const rule = recurrence("N[t+1] = toString*N");
  expect(() => trajectory(rule, { parameters: {}, initial: { N: 1 }, periods: 1 })).toThrow(/"toString"/u);
});

test("where a host forbids generated code the interpreter serves, with the same numbers", () => {
  const usual = compileRule(recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)"));
  const makesFunctions = globalThis.Function;
  const forbidding = (): never => {
    throw new EvalError("Code generation from strings disallowed for this context");
  };
  const run = (compiled: typeof usual): Float64Array => {
    const values = new Float64Array(21);
    compiled.path(Float64Array.of(10), Float64Array.of(1.5, 1000), [], 0, 20, values);
    return values;
  };
  const expected = run(usual);
  try {
    globalThis.Function = forbidding as unknown as FunctionConstructor;
    const plain = compileRule(recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)"));
    expect(plain.pathSums).toBeUndefined();
    expect(run(plain)).toEqual(expected);
  } finally {
    globalThis.Function = makesFunctions;
  }
});
