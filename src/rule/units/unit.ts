/** Powers of basic units; an empty map is dimensionless. */
export type Unit = ReadonlyMap<string, number>;

/** Time units: a step is one period, so they cancel in a rule and are compared with each other only. */
const timeUnits: ReadonlySet<string> = new Set([
  "second",
  "s",
  "minute",
  "min",
  "hour",
  "h",
  "day",
  "d",
  "week",
  "month",
  "quarter",
  "year",
  "yr",
  "period",
  "step",
]);

const singular = (word: string): string =>
  timeUnits.has(word.replace(/s$/u, "")) ? word.replace(/s$/u, "") : word;

function multiplyInto(into: Map<string, number>, word: string, power: number): void {
  const total = (into.get(word) ?? 0) + power;
  if (total === 0) into.delete(word);
  else into.set(word, total);
}

/**
 * Reads a unit such as "cells/mL", "1/month", "10^4 cells/mL", "kg per ha": factors separated by spaces, * or /,
 * each with a whole power. A scale such as 10^4 or 1000 is a factor like a word.
 */
export function parseUnit(text: string): Unit {
  const unit = new Map<string, number>();
  let sign = 1;
  for (const [part] of text.replace(/\bper\b/gu, "/").matchAll(/\/|[^\s/*·]+/gu)) {
    if (part === "/") {
      sign = -1;
      continue;
    }
    const [, word = part, power = "1"] = /^(.*?[^\d])\^?(-?\d+)$/u.exec(part) ?? [];
    const isScale = /^[\d.]/u.test(part);
    if (isScale) multiplyInto(unit, part === "1" ? "" : part, sign);
    else multiplyInto(unit, singular(word.replace(/\^$/u, "")), sign * Number(power));
  }
  unit.delete("");
  return unit;
}

export const noUnit: Unit = new Map();

/** The product of two units, the second raised to a power. */
export function multiplyUnits(a: Unit, b: Unit, power: number): Unit {
  const unit = new Map(a);
  for (const [word, own] of b) multiplyInto(unit, word, own * power);
  return unit;
}

export const unitPower = (unit: Unit, power: number): Unit => multiplyUnits(noUnit, unit, power);

/** A unit without its time units. */
export const withoutTimeUnits = (unit: Unit): Unit =>
  new Map([...unit].filter(([word]) => !timeUnits.has(word)));

/** The time units in a unit. */
export const timeUnitsIn = (unit: Unit): readonly string[] =>
  [...unit.keys()].filter((word) => timeUnits.has(word));

export const sameUnit = (a: Unit, b: Unit): boolean => {
  const left = withoutTimeUnits(a);
  const right = withoutTimeUnits(b);
  return left.size === right.size && [...left].every(([word, power]) => right.get(word) === power);
};

const powered = (word: string, power: number): string => (power === 1 ? word : `${word}^${power}`);

/** "the unit cells/mL", or "no unit". */
export const unitPhrase = (unit: Unit): string =>
  unit.size === 0 ? "no unit" : `the unit ${unitText(unit)}`;

/** A unit as text: numerator, then denominator. */
function unitText(unit: Unit): string {
  const above = [...unit].filter(([, power]) => power > 0).map(([word, power]) => powered(word, power));
  const below = [...unit].filter(([, power]) => power < 0).map(([word, power]) => powered(word, -power));
  if (below.length === 0) return above.join(" ");
  return `${above.length === 0 ? "1" : above.join(" ")}/${below.join("/")}`;
}
