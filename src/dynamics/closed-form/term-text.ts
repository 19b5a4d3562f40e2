import type { ClosedTerm } from "./closed-terms.js";

/** A number with the digits that a closed form can be read with, a fraction where it plainly is one. */
function numberText(value: number): string {
  for (const below of [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 12]) {
    const above = value * below;
    if (
      Math.abs(above - Math.round(above)) <= 1e-12 * Math.max(1, Math.abs(above)) &&
      Math.abs(above) < 1e15
    ) {
      return below === 1 ? String(Math.round(above)) : `${Math.round(above)}/${below}`;
    }
  }
  return String(Number(value.toPrecision(10)));
}

const grouped = (text: string): string => (/[-/ ]/u.test(text) ? `(${text})` : text);

/** What a pair of complex roots adds up to: a cosine and a sine, a vanishing one left out. */
function waveText(root: ClosedTerm["root"], { re, im }: ClosedTerm["coefficient"]): string {
  const angle = numberText(Math.atan2(root.im, root.re));
  const waves = [
    [2 * re, "cos"],
    [-2 * im, "sin"],
  ] as const;
  const parts = waves
    .filter(([amount]) => Math.abs(amount) > 1e-14 * Math.hypot(re, im))
    .map(([amount, wave]) => `${grouped(numberText(amount))}*${wave}(${angle}*t)`);
  return parts.length === 1 ? parts[0]! : `(${parts.join(" + ")})`;
}

/** Text of one term in the rule language; of a complex pair, the one above the real line stands for both. */
function termText({ root, power, coefficient }: ClosedTerm): string {
  if (root.modulus === 0) return `if(t == ${power}, ${numberText(coefficient.re)}, 0)`;
  const count = power === 0 ? [] : [power === 1 ? "t" : `t^${power}`];
  if (root.im === 0) {
    const base = root.exact ?? numberText(root.re);
    const grows = base === "1" ? [] : [`${grouped(base)}^t`];
    const parts = [numberText(coefficient.re), ...count, ...grows];
    return (parts.length > 1 && parts[0] === "1" ? parts.slice(1) : parts.map(grouped)).join("*");
  }
  const size = numberText(root.modulus);
  return [...count, ...(size === "1" ? [] : [`${grouped(size)}^t`]), waveText(root, coefficient)].join("*");
}

/** A closed form as text of the rule language, to ten digits. */
export function termsText(terms: readonly ClosedTerm[]): string {
  const shown = terms.filter(({ root }) => root.im >= 0).map(termText);
  return shown.length === 0 ? "0" : shown.join(" + ");
}
