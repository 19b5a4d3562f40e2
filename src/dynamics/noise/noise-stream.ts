import { seededWords } from "../../numeric/index.js";
import { noiseKernelBytes } from "./noise-kernel-bytes.js";

/** Values are made so many at a time at most. */
export const noiseCapacity = 4096;

/** Random values made many at a time, from one seed; the same values whatever the sizes of the lots. */
export interface NoiseStream {
  /** Standard normal values [count], at most `noiseCapacity`; they hold until any stream is next asked. */
  readonly normals: (count: number) => Float64Array;
  /** Factors exp(centre + sd z) [count] for standard normal z; likewise. */
  readonly factors: (count: number, centre: number, sd: number) => Float64Array;
}

interface Kernel {
  readonly state: BigUint64Array;
  readonly values: Float64Array;
  readonly normals: (count: number) => void;
  readonly factors: (count: number, centre: number, sd: number) => void;
}

/** What noise-kernel.c exports. */
interface KernelExports {
  readonly memory: { readonly buffer: ArrayBuffer };
  readonly state_place: () => number;
  readonly values_place: () => number;
  readonly prepare: () => void;
  readonly normals: (count: number) => void;
  readonly factors: (count: number, centre: number, sd: number) => void;
}

/** The part of the language's WebAssembly that is used; the library of types leaves it to hosts. */
interface AssemblyHost {
  readonly Module: new (bytes: Uint8Array) => object;
  /** The exports are those that the kernel's build lists. */
  readonly Instance: new (
    module: object,
  ) => { readonly exports: KernelExports };
}

let loaded: Kernel | undefined;

/** The kernel, loaded once; all streams take turns with it. */
function kernel(): Kernel {
  if (loaded === undefined) {
    const bytes = Uint8Array.from(atob(noiseKernelBytes), (letter) => letter.charCodeAt(0));
    const { Instance, Module } = (globalThis as unknown as { WebAssembly: AssemblyHost }).WebAssembly;
    const own = new Instance(new Module(bytes)).exports;
    own.prepare();
    loaded = {
      state: new BigUint64Array(own.memory.buffer, own.state_place(), 4),
      values: new Float64Array(own.memory.buffer, own.values_place(), noiseCapacity),
      normals: own.normals,
      factors: own.factors,
    };
  }
  return loaded;
}

/**
 * A stream of random values made many at a time by the noise kernel, for ensembles.
 *
 * @param seed - a whole number from 0 to 2^53 - 1.
 * @example noiseStream(1).normals(3).length; // 3
 */
export function noiseStream(seed: number): NoiseStream {
  const words = seededWords(seed);
  const withState = (make: (own: Kernel) => void, count: number): Float64Array => {
    const own = kernel();
    own.state.set(words);
    make(own);
    words.set(own.state);
    return own.values.subarray(0, count);
  };
  return Object.freeze({
    normals: (count: number) => withState((own) => own.normals(count), count),
    factors: (count: number, centre: number, sd: number) =>
      withState((own) => own.factors(count, centre, sd), count),
  });
}
