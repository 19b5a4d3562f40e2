import { type RandomStream, randomStream } from "../../numeric/index.js";

/** Paths that share a stream. More paths leave the earlier whole blocks as they are; more periods leave all. */
export const blockSize = 1024;

/** One stream a block of paths, seeded from the given one. */
export function blockStreams(stream: RandomStream, paths: number): readonly RandomStream[] {
  const blocks = Math.ceil(paths / blockSize);
  return Array.from({ length: blocks }, () => randomStream(Math.floor(stream.uniform() * 2 ** 53)));
}
