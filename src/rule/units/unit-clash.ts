import { parseUnit, sameUnit, type Unit } from "./unit.js";

const isScale = (word: string): boolean => /^[\d.]/u.test(word);

/** Numeric factor of a unit: 10000 for "10^4 cells/mL". */
function scaleOf(unit: Unit): number {
  return [...unit].reduce((product, [word, power]) => {
    const [base = "", exponent = "1"] = isScale(word) ? word.split("^") : ["1"];
    return product * (Number(base) ** Number(exponent)) ** power;
  }, 1);
}

const withoutScale = (unit: Unit): Unit => new Map([...unit].filter(([word]) => !isScale(word)));

/**
 * Difference between two stated units: "kind" if they measure different things, otherwise the factor between them.
 * Undefined if they agree, or if one of them is not stated.
 *
 * @example unitClash("10^4 cells/mL", "cells per mL"); // 10000
 */
export function unitClash(one: string, other: string): "kind" | number | undefined {
  if (one === "" || other === "") return undefined;
  const [first, second] = [parseUnit(one), parseUnit(other)];
  if (!sameUnit(withoutScale(first), withoutScale(second))) return "kind";
  const factor = scaleOf(first) / scaleOf(second);
  return Math.abs(factor - 1) < 1e-9 ? undefined : factor;
}
