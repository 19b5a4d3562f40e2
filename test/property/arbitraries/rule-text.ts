import * as fc from "fast-check";

const leaf = fc.oneof(
  fc.constantFrom("N", "P", "r", "K", "u", "u[t+1]", "t", "N[t-1]", "P[t-2]"),
  fc.constantFrom("0", "1", "2", "0.5", "1e-3", "7.25", "12"),
);

interface Parts {
  number: string;
  condition: string;
}

/** What an expression of a rule may be made of; `smooth` leaves out kinks and jumps. */
export function expressionText(smooth: boolean): fc.Arbitrary<string> {
  const bent = smooth ? [] : ["abs", "sign", "floor", "ceil", "round"];
  return fc.letrec<Parts>((tie) => {
    const number = tie("number");
    const condition = tie("condition");
    const operations = [
      fc.tuple(number, fc.constantFrom("+", "-", "*", "/"), number).map(([a, s, b]) => `(${a} ${s} ${b})`),
      fc.tuple(number, fc.constantFrom("2", "3", "0.5", "-1", "r")).map(([a, b]) => `(${a})^${b}`),
      fc
        .tuple(fc.constantFrom("exp", "log", "log10", "sqrt", "sin", "cos", "tan", ...bent), number)
        .map(([name, a]) => `${name}(${a})`),
      number.map((a) => `-${a}`),
    ];
    const bending = [
      fc.tuple(fc.constantFrom("min", "max", "mod"), number, number).map(([f, a, b]) => `${f}(${a}, ${b})`),
      fc.tuple(condition, number, number).map(([c, a, b]) => `if(${c}, ${a}, ${b})`),
      number.map((a) => `round(${a}, 2)`),
    ];
    return {
      number: fc.oneof({ maxDepth: 5 }, leaf, ...operations, ...(smooth ? [] : bending)),
      condition: fc.oneof(
        { maxDepth: 3 },
        fc
          .tuple(number, fc.constantFrom("<", "<=", ">", ">=", "==", "!="), number)
          .map(([a, s, b]) => `${a} ${s} ${b}`),
        fc.tuple(condition, fc.constantFrom("and", "or"), condition).map(([a, s, b]) => `(${a}) ${s} (${b})`),
        condition.map((a) => `not (${a})`),
      ),
    };
  }).number;
}

/** Texts of a system of two states with a quantity, lags and an input. */
export function ruleSource(smooth: boolean): fc.Arbitrary<string> {
  const part = expressionText(smooth);
  return fc
    .tuple(part, part, part, fc.constantFrom("N[t+1] = ", "ΔN = ", "change(N) = "))
    .map(([a, b, c, form]) => `q = ${a}\n${form}${b} + q\nP[t+1] = ${c}`);
}

/** Soup of the language's own signs and words, more often nearly right than random letters are. */
export const soup: fc.Arbitrary<string> = fc
  .array(
    fc.constantFrom(
      ..."N[t+1] = ΔN = change( exp( min( if( ( ) [ ] , + - * / ^ < <= == = # 1 2.5 .5 1e3 N K r t and or not \n \n ∆ − × { } ' % ; \\ ` $ constructor __proto__ 𝛼 é".split(
        " ",
      ),
    ),
    { maxLength: 30 },
  )
  .map((parts) => parts.join(" "));
