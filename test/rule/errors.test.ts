import { expect, test } from "vitest";
import { type RecurrenceOptions, recurrence } from "../../src/rule/index.js";

const message = (text: string, options?: RecurrenceOptions): string => {
  try {
    recurrence(text, options);
  } catch (error) {
    return (error as Error).message;
  }
  return "";
};

test("an unknown name is an error with its position and the nearest names", () => {
  expect(
    message("x[t+1] = x*(1 + r*(1 - x/capcity))", { parameters: ["r", "capacity"] }),
  ).toMatchInlineSnapshot(`
    "Unknown name "capcity" in the rule.
        x[t+1] = x*(1 + r*(1 - x/capcity))
                                 ^^^^^^^
    Known parameters: r, capacity. Other names: x. Did you mean "capacity"?"
  `);
});

test("a product without an operator is an error that shows the operator", () => {
  expect(message("ΔN = r N")).toMatchInlineSnapshot(`
    "An operator is missing between "r" and "N".
        ΔN = r N
              ^^
    For a product, write r*N."
  `);
  expect(message("ΔN = 2N")).toMatchInlineSnapshot(`
    "An operator is missing between "2" and "N".
        ΔN = 2N
              ^
    For a product, write 2*N."
  `);
  expect(message("ΔN = r*N(1 - N/K)")).toMatchInlineSnapshot(`
    ""N" is not a function.
        ΔN = r*N(1 - N/K)
               ^^
    For a product, write N*( ... )."
  `);
  expect(message("ΔN = (r + 1)(N - 1)")).toMatchInlineSnapshot(`
    "An operator is missing between "(r + 1)" and "( ... )".
        ΔN = (r + 1)(N - 1)
                    ^
    For a product, write (r + 1)*( ... )."
  `);
});

// The notations are those of textbooks and other languages (common practice, no source).
test.each([
  ["N[t+1] = ln(N)", "For the natural logarithm, write log(x)."],
  ["N[t+1] = pow(N, 2)", "For a power, write x^y."],
  ["N[t+1] = ifelse(N > 1, 1, N)", "Write if(condition, a, b)."],
  ["N[t+1] = R*N(t)", "Periods go in square brackets: write N[t]."],
  ["N[t+1] = R*N(t - 1)", "Periods go in square brackets: write N[t-1]."],
  ["N(t+1) = R*N(t)", "Periods go in square brackets: write N[t+1] = ..."],
  ["dN/dt = r*N", "For the change per period, write ΔN = ..."],
  ["# growth\n  dowed / dt = r*owed", "For the change per period, write Δowed = ..."],
  ["N_{t+1} = R*N", "Periods go in square brackets: write N[t+1]."],
  ["N[t+1] = R*N_{t}", "Periods go in square brackets: write N[t]."],
  ["N[t+1] = R*N*(1 - N/N_{max})", "Write N_max."],
  ["N_t+1 = R*N", "For the next value, write N[t+1] = ..."],
  ["N[t+1] = R*N_t", "For the present value, write N or N[t]."],
  ["N[t+1] = N**2", "For a power, write ^, as in N^2."],
  ["N[t+1] = 2N", "For a product, write 2*N."],
  ["N[t+1] = 2x", "For a product, write 2*x."],
])("%s is answered with what to write instead", (text, remedy) => {
  expect(message(text).split("\n").at(-1)).toBe(remedy);
});

test("what the hints say to write is read", () => {
  const rules = [
    "N[t+1] = log(N)",
    "N[t+1] = N^2",
    "N[t+1] = if(N > 1, 1, N)",
    "N[t+1] = R*N[t]",
    "N[t+1] = R*N[t-1]",
    "ΔN = r*N",
    "N[t+1] = R*N*(1 - N/N_max)",
    "N[t+1] = 2*N",
  ];
  expect(rules.map((text) => message(text))).toEqual(rules.map(() => ""));
  expect(message("N[t+1] = R*N_t", { parameters: ["R", "N_t"] })).toBe("");
});

test("a mistyped function is an error with the nearest names", () => {
  expect(message("N[t+1] = N*epx(r)")).toMatchInlineSnapshot(`
    ""epx" is not a function.
        N[t+1] = N*epx(r)
                   ^^^^
    For a product, write epx*( ... ). Did you mean "exp"?"
  `);
});

test("a wrong number of arguments is an error with the usage", () => {
  expect(message("N[t+1] = max(N)")).toMatchInlineSnapshot(`
    ""max" takes 2 or more arguments; 1 was given.
        N[t+1] = max(N)
                 ^^^^^^
    Write max(a, b, ...)."
  `);
  expect(message("N[t+1] = exp()")).toMatchInlineSnapshot(`
    ""exp" takes 1 argument; 0 were given.
        N[t+1] = exp()
                 ^^^^^
    Write exp(x)."
  `);
});

test("a future value is an error, except an input of the next period", () => {
  expect(message("N[t+1] = N[t+1] + 1")).toMatchInlineSnapshot(`
    ""N[t+1]" is a future value, and cannot be read on the right-hand side.
        N[t+1] = N[t+1] + 1
                 ^^^^^^
    Only inputs can be read at [t+1]. Define the shared part as a quantity on a line above, and use it in both lines."
  `);
  expect(message("owed[t+1] = owed - paid[t+2]", { inputs: ["paid"] })).toMatchInlineSnapshot(`
    ""paid[t+2]" is beyond the next period.
        owed[t+1] = owed - paid[t+2]
                           ^^^^^^^^^
    Inputs can be read up to paid[t+1]."
  `);
  expect(message("owed[t+1] = owed - paid[t+1]", { inputs: ["paid"] })).toBe("");
  expect(message("owed[t+1] = owed - paid[t+1]")).toMatchInlineSnapshot(`
    ""paid" is a parameter, which has one value for all periods.
        owed[t+1] = owed - paid[t+1]
                           ^^^^^^^^^
    If paid is recorded by period, declare it as an input: { inputs: ["paid"] }."
  `);
});

test("quantities defined by each other are an error", () => {
  expect(message("a = b + 1\nb = a + 1\nN[t+1] = a")).toMatchInlineSnapshot(`
    ""b" is used here but defined on line 2; lines are evaluated from top to bottom.
        a = b + 1
            ^
    Move line 2 above this one. If the two lines depend on each other, write one expression into the other."
  `);
  expect(message("a = a + 1\nN[t+1] = a")).toMatchInlineSnapshot(`
    ""a" is defined by itself.
        a = a + 1
            ^
    For the next value, write a[t+1] = ...; otherwise give the quantity another name."
  `);
});

test("chained comparisons, and numbers in place of conditions, are errors", () => {
  expect(message("N[t+1] = if(0 < N < K, N, K)")).toMatchInlineSnapshot(`
    "Comparisons cannot be chained.
        N[t+1] = if(0 < N < K, N, K)
                          ^
    Join two comparisons with and, as in 0 < N and N < K."
  `);
  expect(message("N[t+1] = N*(N > 3)")).toMatchInlineSnapshot(`
    "This is a condition, but a number is needed here.
        N[t+1] = N*(N > 3)
                   ^^^^^^^
    To use a condition as a number, write if(condition, 1, 0)."
  `);
  expect(message("N[t+1] = if(N, 1, 2)")).toMatchInlineSnapshot(`
    "This is a number, but a condition is needed here.
        N[t+1] = if(N, 1, 2)
                    ^
    Compare the number with another one, as in N > 0."
  `);
});

test("numbers of mathematics are not taken for granted", () => {
  expect(message("N[t+1] = N*e^r")).toMatchInlineSnapshot(`
    ""e" is not predefined.
        N[t+1] = N*e^r
                   ^
    For e^x, write exp(x). To use e as a parameter, declare it: { parameters: ["e", ...] }."
  `);
  expect(message("N[t+1] = N*e", { parameters: ["e"] })).toBe("");
});

test("operators of other notations are errors with the operator to write", () => {
  expect(message("N[t+1] = N**2")).toMatchInlineSnapshot(`
    ""**" is not part of the rule language.
        N[t+1] = N**2
                  ^^
    For a power, write ^, as in N^2."
  `);
  expect(message("N' = r*N")).toMatchInlineSnapshot(`
    ""'" is not part of the rule language.
        N' = r*N
         ^
    For the next value, write N[t+1]; for the change, ΔN."
  `);
  expect(message("N[t+1] = 5%*N")).toMatchInlineSnapshot(`
    ""%" is not part of the rule language.
        N[t+1] = 5%*N
                  ^
    For 5%, write 5/100; for a remainder, mod(x, m)."
  `);
  expect(message("N[n+1] = r*N")).toMatchInlineSnapshot(`
    "The index of "N" must be t, t+1, t-1 and so on.
        N[n+1] = r*N
         ^^
    Write N or N[t] for the present value, N[t-1] or N[t-2] for a past one, and N[t+1] for the next."
  `);
  expect(message("N[t+1] = 0,5*N")).toMatchInlineSnapshot(`
    ""," is not expected here.
        N[t+1] = 0,5*N
                  ^
    Use a decimal point, as in 0.5."
  `);
});

test("lines that set nothing, or set a name twice, are errors", () => {
  expect(message("r*N*(1 - N/K)")).toMatchInlineSnapshot(`
    "This line does not set anything.
        r*N*(1 - N/K)
        ^
    Each line sets the next value of a state (N[t+1] = ...), its change (ΔN = ...) or a quantity within the period (paid = ...)."
  `);
  expect(message("")).toMatchInlineSnapshot(`
    "The rule is empty.
        
        ^
    Each line sets the next value of a state (N[t+1] = ...), its change (ΔN = ...) or a quantity within the period (paid = ...)."
  `);
  expect(message("q = r*2")).toMatchInlineSnapshot(`
    "No line sets the next value of a state.
        q = r*2
        ^^^^^^^
    Add a line such as N[t+1] = ... or ΔN = ..."
  `);
  expect(message("N[t+1] = 2\nΔN = 3")).toMatchInlineSnapshot(`
    ""N" is set by two lines.
        ΔN = 3
         ^
    Remove one of the lines, or use another name in it."
  `);
  expect(message("N[t] = 2")).toMatchInlineSnapshot(`
    "A line can only set the next value of "N".
        N[t] = 2
        ^^^^
    Write N[t+1] = ..."
  `);
  expect(message("N[t+1] = 2*ΔN")).toMatchInlineSnapshot(`
    "Δ can only start a line.
        N[t+1] = 2*ΔN
                   ^
    Write the change as a line of its own, as in ΔN = r*N. For the last change, write N - N[t-1]."
  `);
});

test("texts beyond the limits of length, nesting and terms are errors", () => {
  expect(message(`N[t+1] = ${"N + ".repeat(6000)}N`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 24010 characters; the limit is 20000."`,
  );
  expect(message(`N[t+1] = ${"(".repeat(500)}N${")".repeat(500)}`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 101 levels of nesting; the limit is 100."`,
  );
  expect(message(`N[t+1] = ${"N+".repeat(3000)}N`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 5001 terms and operators; the limit is 5000."`,
  );
  expect(message(`N[t+1] = ${"-".repeat(500)}N`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 101 levels of nesting; the limit is 100."`,
  );
  expect(message(`N[t+1] = ${"2^".repeat(500)}N`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 101 levels of nesting; the limit is 100."`,
  );
});

test("options with unknown names or values of the wrong kind are errors", () => {
  expect(message("N[t+1] = R*N", { start: { r: 1 } })).toMatchInlineSnapshot(
    `"Option \`start\`: the rule has no parameter "r". It has R. Did you mean "R"?"`,
  );
  expect(message("N[t+1] = R*N", { bounds: { R: [2, 1] } })).toMatchInlineSnapshot(
    `"Option \`bounds\`: "R" was given as [2,1]. Give two numbers, the lower one first, as in [0, Infinity]."`,
  );
  expect(message("N[t+1] = R*N + N[t-2]", { initial: { N: 3 } })).toMatchInlineSnapshot(
    `"Option \`initial\`: "N" was given as 3. Give 3 numbers, oldest first, because the rule reads N[t-2]."`,
  );
});

test("names one letter apart and unused names are findings, not errors", () => {
  const rule = recurrence("ΔN = growth*N*(1 - N/capacity) - grovth*N", { inputs: ["rain"] });
  expect(rule.findings.map(({ code, message }) => `${code}: ${message}`)).toMatchInlineSnapshot(`
    [
      "names-look-alike: "growth" and "grovth" differ by one letter and are treated as two names. If one is a typo, correct it. To reject undeclared names, list the parameters: { parameters: [...] }.",
      "declared-but-unused: "rain" is declared but not used in the rule. Remove it, or check the text for a typo.",
    ]
  `);
});

test("names of one appearance in two alphabets are found", () => {
  const rule = recurrence("ΔN = r*N*(1 - \u039d/K)"); // the second is a Greek capital nu
  expect(rule.findings.map(({ code }) => code)).toEqual(["names-look-alike"]);
});
