import { expect, test } from "vitest";
import { normalCdf, randomStream } from "../../src/numeric/index.js";
import { advance, jumpedState, seededState } from "../../src/numeric/probability/xoshiro.js";

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

test("jumps commute with draws and leave the stream itself alone", () => {
  const ahead = jumpedState(seededState(7));
  drawn(ahead);
  const state = seededState(7);
  drawn(state);
  expect([...jumpedState(state)].slice(0, 8)).toEqual([...ahead].slice(0, 8));
  const stream = randomStream(7);
  const other = stream.jump();
  expect(stream.uniform()).toBe(randomStream(7).uniform());
  expect(other.uniform()).not.toBe(randomStream(7).uniform());
});

// Expected shares are those of the normal distribution; 4 standard errors of a share of 200,000 draws.
test("normal values have the shares of the normal distribution, tails included", () => {
  const stream = randomStream(11);
  const values = Float64Array.from({ length: 200_000 }, () => stream.normal()).sort();
  for (const at of [-3.7, -3, -2, -1, -0.2, 0, 0.5, 1, 2, 3, 3.7]) {
    const share = values.findIndex((value) => value > at) / values.length;
    const expected = normalCdf(at);
    expect(Math.abs(share - expected)).toBeLessThan(
      4 * Math.sqrt((expected * (1 - expected)) / values.length),
    );
  }
});

test("refuses a seed that is not a whole number", () => {
  expect(() => randomStream(1.5)).toThrow(expect.objectContaining({ code: "bad-seed" }));
});
