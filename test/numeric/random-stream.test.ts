import { describe, expect, test } from "vitest";
import { randomStream } from "../../src/numeric/index.js";
import { advance, jumpedState, seededState } from "../../src/numeric/probability/xoshiro.js";
import { zigguratNormal } from "../../src/numeric/probability/ziggurat.js";

function word(high: number, low: number): bigint {
  return (BigInt(high >>> 0) << 32n) | BigInt(low >>> 0);
}
function drawn(state: Int32Array): bigint {
  advance(state);
  return word(state[8]!, state[9]!);
}

// Source: values of the authors' reference code from the state 1, 2, 3, 4, as the test suites of several
// general-purpose libraries carry them; from memory. The first is rotl(1 + 4, 23) + 1 by hand.
test("the generator gives the published sequence", () => {
  const state = Int32Array.of(0, 1, 0, 2, 0, 3, 0, 4, 0, 0);
  const published = [
    41943041n,
    58720359n,
    3588806011781223n,
    3591011842654386n,
    9228616714210784205n,
    9973669472204895162n,
  ];
  expect(published.map(() => drawn(state))).toEqual(published);
});

// Source: SplitMix64 from the seed 1234567, as published with its reference code; from memory.
test("seeds are spread by the published method", () => {
  const state = seededState(1234567);
  expect(word(state[0]!, state[1]!)).toBe(6457827717110365317n);
  expect(word(state[2]!, state[3]!)).toBe(3203168211198807973n);
});

test("the generator agrees with 64-bit arithmetic over many draws", () => {
  const state = seededState(42);
  const mask = (1n << 64n) - 1n;
  const turn = (x: bigint, k: bigint): bigint => ((x << k) | (x >> (64n - k))) & mask;
  let [a, b, c, d] = [0, 2, 4, 6].map((i) => word(state[i]!, state[i + 1]!)) as [
    bigint,
    bigint,
    bigint,
    bigint,
  ];
  for (let k = 0; k < 2000; k++) {
    const expected = (turn((a + d) & mask, 23n) + a) & mask;
    const shifted = (b << 17n) & mask;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = turn(d, 45n);
    expect(drawn(state)).toBe(expected);
  }
});

// Source: Python integers: the generator's step as a 256 x 256 matrix over the field of two elements, squared 128 times
// and applied to the state 1, 2, 3, 4; no jump polynomial is used. The draws are those from the state it leads to.
test("a jump leads to the state 2^128 draws further on", () => {
  const from = Int32Array.of(0, 1, 0, 2, 0, 3, 0, 4, 0, 0);
  const state = jumpedState(from);
  expect([...from.slice(0, 8)]).toEqual([0, 1, 0, 2, 0, 3, 0, 4]);
  const expected = [0x8c7a153956b5f3d1n, 0x701f1a713401d85en, 0x6527f66a65469085n, 0x8386b786c4408050n];
  expect([0, 2, 4, 6].map((i) => word(state[i]!, state[i + 1]!))).toEqual(expected);
  expect([1, 2, 3, 4].map(() => drawn(state))).toEqual([
    17043750140134683703n,
    2364973248208838314n,
    13951431646535487319n,
    8066193832155293345n,
  ]);
});

test("a jump leaves the stream itself where it is", () => {
  const stream = randomStream(7);
  const other = stream.jump();
  const state = jumpedState(seededState(7));
  expect(stream.uniform()).toBe(randomStream(7).uniform());
  // The 53 highest bits of a draw, in the middle of their cell.
  expect(other.uniform()).toBe((Number(drawn(state) >> 11n) + 0.5) / 2 ** 53);
});

/** Sum of (found - expected)^2 / expected over the classes between the edges, open at both ends. */
function chiSquare(values: Float64Array, edges: readonly number[], shares: readonly number[]): number {
  const counts = new Float64Array(shares.length);
  for (const value of values) {
    let place = 0;
    while (place < edges.length && value > edges[place]!) place++;
    counts[place]!++;
  }
  return shares.reduce((sum, share, i) => {
    const expected = share * values.length;
    return sum + (counts[i]! - expected) ** 2 / expected;
  }, 0);
}

describe("normal values", () => {
  // Source: normal distribution function by mpmath 1.3.0; 99.9% point of chi-square with 31 degrees of freedom from
  // SciPy 1.17.1. The outer classes lie on either side of 3.44, where strips end and the tail begins.
  test("have the frequencies of the normal distribution, either tail apart", () => {
    const half = [0, 0.1, 0.25, 0.4, 0.6, 0.8, 1, 1.25, 1.5, 1.75, 2, 2.5, 3, 3.44, 3.7, 4];
    const above = [
      0.5, 0.460172162722971, 0.4012936743170763, 0.3445782583896758, 0.2742531177500736, 0.21185539858339666,
      0.15865525393145705, 0.10564977366685524, 0.06680720126885806, 0.04005915686381709,
      0.022750131948179212, 0.006209665325776132, 0.0013498980316300946, 0.00029085709329074324,
      0.00010779973347738826, 3.1671241833119924e-5,
    ];
    const shares = above.map((share, i) => share - (above[i + 1] ?? 0));
    const edges = [
      ...half
        .slice(1)
        .map((edge) => -edge)
        .reverse(),
      ...half,
    ];
    const stream = randomStream(20260401);
    const values = Float64Array.from({ length: 4_000_000 }, () => stream.normal());
    expect(chiSquare(values, edges, [...[...shares].reverse(), ...shares])).toBeLessThan(61.1);
  });

  // Source: shares of the tail beyond 3.654... that lie beyond each edge, by mpmath 1.3.0 with 30 digits; 99.9% point of
  // chi-square with 15 degrees of freedom from SciPy 1.17.1. Draws of the lowest strip far out always end in the tail.
  test("have the frequencies of the normal tail where the strips end, on either side", () => {
    const state = seededState(5);
    const drawnInto = new Int32Array(2);
    const values = Float64Array.from({ length: 400_000 }, () => {
      let draws = 0;
      const next = (): void => {
        advance(state);
        // The first draw is put at the end of the lowest strip, on a side that its own bits choose.
        const end = state[8]! < 0 ? [-1, -256] : [0, 0];
        drawnInto.set(draws++ === 0 ? end : state.subarray(8));
      };
      return zigguratNormal(next, drawnInto, 0);
    });
    const half = [3.7, 3.8, 3.9, 4, 4.2, 4.4, 4.8];
    const beyond = [
      1, 0.8355516350482199, 0.560766937395577, 0.372792933594582, 0.2454825911348076, 0.10344239314397487,
      0.041952422014112416, 0.0061490563392907855,
    ];
    const shares = beyond.map((share, i) => 0.5 * (share - (beyond[i + 1] ?? 0)));
    const edges = [...half.map((edge) => -edge).reverse(), 0, ...half];
    expect(chiSquare(values, edges, [...[...shares].reverse(), ...shares])).toBeLessThan(37.7);
    expect(values.every((value) => Math.abs(value) > 3.654152885361)).toBe(true);
  });
});

test.each([1.5, -1, Number.NaN, 2 ** 53])("refuses the seed %d", (seed) => {
  expect(() => randomStream(seed)).toThrow(
    expect.objectContaining({
      code: "bad-seed",
      message: `The seed ${seed} is not a whole number from 0 to 9007199254740991. Give such a number, for example the date of the case as 20260401.`,
      facts: { seed },
    }),
  );
});
