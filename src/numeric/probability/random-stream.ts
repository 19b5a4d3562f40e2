import { badSeed } from "../refusals.js";
import { advance, jumpedState, seededState } from "./xoshiro.js";
import { uniformFrom, zigguratNormal } from "./ziggurat.js";

/** A reproducible sequence of random numbers; the same seed gives the same numbers on every machine. */
export interface RandomStream {
  /** A number in (0, 1), one of 2^53 equally spaced ones. */
  readonly uniform: () => number;
  /** A standard normal value. */
  readonly normal: () => number;
  /** A new stream that starts 2^128 draws further on, so that the two never meet; this one stays where it is. */
  readonly jump: () => RandomStream;
}

/**
 * Random numbers by xoshiro256++, seeded through SplitMix64.
 *
 * @param seed - a whole number from 0 to 2^53 - 1.
 * @throws {ModelError} `bad-seed` for any other value.
 * @see Blackman and Vigna (2021), Scrambled linear pseudorandom number generators, ACM TOMS 47:36.
 * @example randomStream(1).uniform() === randomStream(1).uniform(); // true
 */
export function randomStream(seed: number): RandomStream {
  if (!Number.isSafeInteger(seed) || seed < 0) throw badSeed(seed);
  return streamFrom(seededState(seed));
}

function streamFrom(state: Int32Array): RandomStream {
  const next = (): void => advance(state);
  return Object.freeze({
    uniform: () => {
      advance(state);
      return uniformFrom(state[8]!, state[9]!);
    },
    normal: () => zigguratNormal(next, state, 8),
    jump: () => streamFrom(jumpedState(state)),
  });
}
