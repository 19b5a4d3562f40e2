/** Strips of equal area under the normal curve: 256 strips, the lowest with the tail beyond `tailStart`. */
const strips = 256;
const tailStart = 3.6541528853610088;
const area = 0.00492867323399;

const edge = new Float64Array(strips + 1);
const inner = new Float64Array(strips);
let height = Math.exp(-0.5 * tailStart * tailStart);
edge[0] = area / height;
edge[1] = tailStart;
for (let i = 2; i < strips; i++) {
  edge[i] = Math.sqrt(-2 * Math.log(area / edge[i - 1]! + height));
  height = Math.exp(-0.5 * edge[i]! * edge[i]!);
}
for (let i = 0; i < strips; i++) inner[i] = edge[i + 1]! / edge[i]!;

/**
 * A standard normal value by the ziggurat, the strip and the place in it coming from different bits of a draw.
 *
 * @param next - draws 64 bits into the two integers of `drawn` from place `at` on: high half, low half.
 * @see Doornik (2005), An improved ziggurat method to generate normal random samples.
 */
export function zigguratNormal(next: () => void, drawn: Int32Array, at: number): number {
  for (;;) {
    next();
    const low = drawn[at + 1]!;
    const strip = low & (strips - 1);
    const place = uniformFrom(drawn[at]!, low) * 2 - 1;
    if (Math.abs(place) < inner[strip]!) return place * edge[strip]!;
    if (strip === 0) return tail(next, drawn, at, place < 0);
    const value = place * edge[strip]!;
    const outside = Math.exp(-0.5 * (edge[strip]! ** 2 - value * value));
    const inside = Math.exp(-0.5 * (edge[strip + 1]! ** 2 - value * value));
    next();
    if (inside + uniformFrom(drawn[at]!, drawn[at + 1]!) * (outside - inside) < 1) return value;
  }
}

/** 53 bits of a draw as a number in (0, 1): the middle of one of 2^53 equal cells, so never 0. */
export function uniformFrom(high: number, low: number): number {
  return ((high >>> 0) * 2097152 + (low >>> 11) + 0.5) * 2 ** -53;
}

/** A value beyond `tailStart`: Marsaglia's method of 1964. */
function tail(next: () => void, drawn: Int32Array, at: number, negative: boolean): number {
  for (;;) {
    next();
    const x = Math.log(uniformFrom(drawn[at]!, drawn[at + 1]!)) / tailStart;
    next();
    const y = Math.log(uniformFrom(drawn[at]!, drawn[at + 1]!));
    if (-2 * y >= x * x) return negative ? x - tailStart : tailStart - x;
  }
}
