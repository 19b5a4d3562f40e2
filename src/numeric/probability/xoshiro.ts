/**
 * Advances a xoshiro256++ generator in 32-bit halves: exact integer arithmetic, the same on every machine.
 *
 * @param state - [10]: s0 to s3 as (high, low) pairs, then the high and low half of the value drawn.
 * @see Blackman and Vigna (2021), Scrambled linear pseudorandom number generators, ACM TOMS 47:36.
 */
export function advance(state: Int32Array): void {
  const aHigh = state[0]!;
  const aLow = state[1]!;
  let dHigh = state[6]!;
  let dLow = state[7]!;
  // rotl(s0 + s3, 23) + s0
  const low = (aLow + dLow) | 0;
  const high = (aHigh + dHigh + (low >>> 0 < aLow >>> 0 ? 1 : 0)) | 0;
  const turnedHigh = (high << 23) | (low >>> 9);
  const turnedLow = (low << 23) | (high >>> 9);
  const drawnLow = (turnedLow + aLow) | 0;
  state[8] = (turnedHigh + aHigh + (drawnLow >>> 0 < aLow >>> 0 ? 1 : 0)) | 0;
  state[9] = drawnLow;

  const bHigh = state[2]!;
  const bLow = state[3]!;
  const cHigh = state[4]! ^ aHigh;
  const cLow = state[5]! ^ aLow;
  dHigh ^= bHigh;
  dLow ^= bLow;
  state[0] = aHigh ^ dHigh;
  state[1] = aLow ^ dLow;
  state[2] = bHigh ^ cHigh;
  state[3] = bLow ^ cLow;
  state[4] = cHigh ^ ((bHigh << 17) | (bLow >>> 15));
  state[5] = cLow ^ (bLow << 17);
  // rotl(s3, 45): the halves change places, then 13 more.
  state[6] = (dLow << 13) | (dHigh >>> 19);
  state[7] = (dHigh << 13) | (dLow >>> 19);
}

/**
 * Four 64-bit words from a seed of up to 53 bits: the state of a generator.
 *
 * @see Steele, Lea and Flood (2014), Fast splittable pseudorandom number generators, OOPSLA: SplitMix64.
 */
export function seededWords(seed: number): BigUint64Array {
  const words = new BigUint64Array(4);
  let counter = BigInt(seed);
  for (let i = 0; i < 4; i++) {
    counter = BigInt.asUintN(64, counter + 0x9e3779b97f4a7c15n);
    let word = BigInt.asUintN(64, (counter ^ (counter >> 30n)) * 0xbf58476d1ce4e5b9n);
    word = BigInt.asUintN(64, (word ^ (word >> 27n)) * 0x94d049bb133111ebn);
    words[i] = word ^ (word >> 31n);
  }
  return words;
}

/** The state, as `advance` takes it, that follows from a seed. */
export function seededState(seed: number): Int32Array {
  const state = new Int32Array(10);
  seededWords(seed).forEach((word, i) => {
    state[2 * i] = Number(BigInt.asIntN(32, word >> 32n));
    state[2 * i + 1] = Number(BigInt.asIntN(32, word));
  });
  return state;
}

/** The jump polynomial in 32-bit words, the lowest bits of each 64-bit word first. */
const jumpWords = [
  0x3cfd0aba, 0x180ec6d3, 0xf0c9392c, 0xd5a61266, 0xe03fc9aa, 0xa9582618, 0x29b1661c, 0x39abdc45,
];

/** The state 2^128 draws further on; the state given stays as it is. */
export function jumpedState(from: Int32Array): Int32Array {
  const state = from.slice();
  const sum = new Int32Array(10);
  for (let bit = 0; bit < 256; bit++) {
    const chosen = (jumpWords[bit >>> 5]! >>> (bit & 31)) & 1;
    for (let i = 0; i < 8 && chosen === 1; i++) sum[i] = sum[i]! ^ state[i]!;
    advance(state);
  }
  return sum;
}
