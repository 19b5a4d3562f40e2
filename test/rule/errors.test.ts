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

test("an unknown name is refused with its place and the nearest names", () => {
  expect(
    message("x[t+1] = x*(1 + r*(1 - x/capcity))", { parameters: ["r", "capacity"] }),
  ).toMatchInlineSnapshot(`
    "Unknown name "capcity" in the rule.
        x[t+1] = x*(1 + r*(1 - x/capcity))
                                 ^^^^^^^
    Known parameters: r, capacity. Other names: x. Did you mean "capacity"?"
  `);
});

test("a product without its sign is refused with the sign shown", () => {
  expect(message("ΔN = r N")).toMatchInlineSnapshot(`
    "There is no sign between "r" and "N".
        ΔN = r N
              ^^
    A product needs its sign: write r*N."
  `);
  expect(message("ΔN = 2N")).toMatchInlineSnapshot(`
    "There is no sign between "2" and "N".
        ΔN = 2N
              ^
    A product needs its sign: write 2*N."
  `);
  expect(message("ΔN = r*N(1 - N/K)")).toMatchInlineSnapshot(`
    ""N" is not a function, so "N(" has no meaning.
        ΔN = r*N(1 - N/K)
               ^^
    For a product write N*( ... ); for a past value write N[t-1]."
  `);
  expect(message("ΔN = (r + 1)(N - 1)")).toMatchInlineSnapshot(`
    "There is no sign between "(r + 1)" and "( ... )".
        ΔN = (r + 1)(N - 1)
                    ^
    A product needs its sign: write (r + 1)*( ... )."
  `);
});

test("a mistyped function is refused with the nearest ones", () => {
  expect(message("N[t+1] = N*epx(r)")).toMatchInlineSnapshot(`
    ""epx" is not a function, so "epx(" has no meaning.
        N[t+1] = N*epx(r)
                   ^^^^
    For a product write epx*( ... ); for a past value write epx[t-1]. Did you mean "exp"?"
  `);
});

test("a wrong number of values is refused with the way to write the call", () => {
  expect(message("N[t+1] = max(N)")).toMatchInlineSnapshot(`
    "This call has 1 value, which does not fit max(a, b, ...).
        N[t+1] = max(N)
                 ^^^^^^
    Write it as max(a, b, ...)."
  `);
  expect(message("N[t+1] = exp()")).toMatchInlineSnapshot(`
    "This call has 0 values, which does not fit exp(x).
        N[t+1] = exp()
                 ^^^^^
    Write it as exp(x)."
  `);
});

test("a value of the future is refused, except the next row's input", () => {
  expect(message("N[t+1] = N[t+1] + 1")).toMatchInlineSnapshot(`
    ""N[t+1]" is a value of the future on the right of a line.
        N[t+1] = N[t+1] + 1
                 ^^^^^^
    Only inputs may be read at [t+1]. Name the part that both lines share as a quantity above them."
  `);
  expect(message("owed[t+1] = owed - paid[t+2]", { inputs: ["paid"] })).toMatchInlineSnapshot(`
    ""paid[t+2]" lies beyond the period that the step leads to.
        owed[t+1] = owed - paid[t+2]
                           ^^^^^^^^^
    An input may be read up to paid[t+1]."
  `);
  expect(message("owed[t+1] = owed - paid[t+1]", { inputs: ["paid"] })).toBe("");
  expect(message("owed[t+1] = owed - paid[t+1]")).toMatchInlineSnapshot(`
    ""paid" is a parameter and has no value of its own in other periods.
        owed[t+1] = owed - paid[t+1]
                           ^^^^^^^^^
    If it is recorded by period, declare it: { inputs: ["paid"] }."
  `);
});

test("quantities that need each other are refused", () => {
  expect(message("a = b + 1\nb = a + 1\nN[t+1] = a")).toMatchInlineSnapshot(`
    ""b" is read here and set only on line 2; quantities are worked out from the top down.
        a = b + 1
            ^
    Move its line above this one; where two lines need each other, write one of them out."
  `);
  expect(message("a = a + 1\nN[t+1] = a")).toMatchInlineSnapshot(`
    ""a" is set from itself.
        a = a + 1
            ^
    Write the next value as a[t+1] = ... or give the quantity another name."
  `);
});

test("chained comparisons and sorts that do not fit are refused", () => {
  expect(message("N[t+1] = if(0 < N < K, N, K)")).toMatchInlineSnapshot(`
    "A comparison joins two values, and this is a third.
        N[t+1] = if(0 < N < K, N, K)
                          ^
    Join two comparisons with and, as in 0 < N and N < K."
  `);
  expect(message("N[t+1] = N*(N > 3)")).toMatchInlineSnapshot(`
    "This is a condition, yes or no, where a number is needed.
        N[t+1] = N*(N > 3)
                   ^^^^^^^
    Turn it into a number with if(condition, 1, 0)."
  `);
  expect(message("N[t+1] = if(N, 1, 2)")).toMatchInlineSnapshot(`
    "This is a number where a condition, yes or no, is needed.
        N[t+1] = if(N, 1, 2)
                    ^
    Compare it with something, as in N > 0."
  `);
});

test("numbers of mathematics are not taken for granted", () => {
  expect(message("N[t+1] = N*e^r")).toMatchInlineSnapshot(`
    ""e" is not taken for a number of mathematics.
        N[t+1] = N*e^r
                   ^
    Write exp(1), or declare it as a parameter of your own: { parameters: ["e", ...] }."
  `);
  expect(message("N[t+1] = N*e", { parameters: ["e"] })).toBe("");
});

test("signs of other notations are refused with ours", () => {
  expect(message("N[t+1] = N**2")).toMatchInlineSnapshot(`
    "The sign "**" has no meaning in a rule.
        N[t+1] = N**2
                  ^^
    Write a power with ^, as in N^2."
  `);
  expect(message("N' = r*N")).toMatchInlineSnapshot(`
    "The sign "'" has no meaning in a rule.
        N' = r*N
         ^
    Write the next value as N[t+1]."
  `);
  expect(message("N[t+1] = 5%*N")).toMatchInlineSnapshot(`
    "The sign "%" has no meaning in a rule.
        N[t+1] = 5%*N
                  ^
    Write the number as a fraction, as in 5/100, or use mod(x, m)."
  `);
  expect(message("N[n+1] = r*N")).toMatchInlineSnapshot(`
    "The period of "N" must be counted from t.
        N[n+1] = r*N
         ^^
    Write the present value as N or N[t], a past one as N[t-1], N[t-2], the next as N[t+1]."
  `);
  expect(message("N[t+1] = 0,5*N")).toMatchInlineSnapshot(`
    "The sign "," joins nothing here.
        N[t+1] = 0,5*N
                  ^
    Write decimals with a point, as in 0.5."
  `);
});

test("lines that set nothing, or the same thing twice, are refused", () => {
  expect(message("r*N*(1 - N/K)")).toMatchInlineSnapshot(`
    "The line does not say what it sets.
        r*N*(1 - N/K)
        ^
    A line sets a next value, N[t+1] = ..., a change, ΔN = ..., or a named quantity, paid = ..."
  `);
  expect(message("")).toMatchInlineSnapshot(`
    "The rule has no line.
        
        ^
    A line sets a next value, N[t+1] = ..., a change, ΔN = ..., or a named quantity, paid = ..."
  `);
  expect(message("q = r*2")).toMatchInlineSnapshot(`
    "No line of the rule says how a value changes from one period to the next.
        q = r*2
        ^^^^^^^
    Write one line as N[t+1] = ... or ΔN = ..."
  `);
  expect(message("N[t+1] = 2\nΔN = 3")).toMatchInlineSnapshot(`
    ""N" is set twice.
        ΔN = 3
         ^
    Keep one of the lines, or give the other another name."
  `);
  expect(message("N[t] = 2")).toMatchInlineSnapshot(`
    "A line can set the next value of "N" only, at [t+1].
        N[t] = 2
        ^^^^
    A line sets a next value, N[t+1] = ..., a change, ΔN = ..., or a named quantity, paid = ..."
  `);
  expect(message("N[t+1] = 2*ΔN")).toMatchInlineSnapshot(`
    "The change sign stands inside an expression.
        N[t+1] = 2*ΔN
                   ^
    A change may only begin a line, as in ΔN = r*N. Use N - N[t-1] for the last change."
  `);
});

test("texts beyond the limits of length, depth and parts are refused at once", () => {
  expect(message(`N[t+1] = ${"N + ".repeat(6000)}N`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 24010 letters, more than the 20000 that are read."`,
  );
  expect(message(`N[t+1] = ${"(".repeat(500)}N${")".repeat(500)}`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 101 levels of nesting, more than the 100 that are read."`,
  );
  expect(message(`N[t+1] = ${"N+".repeat(3000)}N`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 5001 parts, more than the 5000 that are read."`,
  );
  expect(message(`N[t+1] = ${"-".repeat(500)}N`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 101 levels of nesting, more than the 100 that are read."`,
  );
  expect(message(`N[t+1] = ${"2^".repeat(500)}N`).split("\n")[0]).toMatchInlineSnapshot(
    `"The rule has 101 levels of nesting, more than the 100 that are read."`,
  );
});

test("options that speak of other names or give no number are refused", () => {
  expect(message("N[t+1] = R*N", { start: { r: 1 } })).toMatchInlineSnapshot(
    `"The option start speaks of "r", which is no parameter of the rule. Known: R. Did you mean "R"?"`,
  );
  expect(message("N[t+1] = R*N", { bounds: { R: [2, 1] } })).toMatchInlineSnapshot(
    `"The option bounds gives [2,1] for "R". Give two numbers, lowest first, as in [0, Infinity]."`,
  );
  expect(message("N[t+1] = R*N + N[t-2]", { initial: { N: 3 } })).toMatchInlineSnapshot(
    `"The option initial gives 3 for "N". Give 3 numbers, oldest first, because the rule reads N[t-2]."`,
  );
});

test("names one letter apart and names never used are findings, not refusals", () => {
  const rule = recurrence("ΔN = growth*N*(1 - N/capacity) - grovth*N", { inputs: ["rain"] });
  expect(rule.findings.map(({ code, message }) => `${code}: ${message}`)).toMatchInlineSnapshot(`
    [
      "names-look-alike: "growth" and "grovth" differ by one letter; they are read as two names. If one is a slip, correct it; declare { parameters: [...] } to have every other name refused.",
      "declared-but-unused: "rain" is declared and stands nowhere in the rule. Take it out, or look for a slip in the text.",
    ]
  `);
});

test("names of one appearance in two alphabets are found", () => {
  const rule = recurrence("ΔN = r*N*(1 - \u039d/K)"); // the second is a Greek capital nu
  expect(rule.findings.map(({ code }) => code)).toEqual(["names-look-alike"]);
});
