import { crc32, deflateSync } from "node:zlib";

/** Pixels of a picture, row by row, four bytes each: red, green, blue, opacity (all opaque). */
export interface Pixels {
  readonly width: number;
  readonly height: number;
  readonly bytes: Uint8Array;
}

const colours = 256;

/**
 * A picture as a PNG with a palette, about a quarter of the size of a full-colour PNG: a plot has few colours, and colours
 * beyond the palette (blends at the edges of lines) are replaced by the nearest one.
 *
 * @see W3C, Portable Network Graphics (PNG) Specification: chunks, colour type 3, filter type 0.
 */
export function indexedPng({ width, height, bytes }: Pixels): Uint8Array {
  const { palette, places } = paletteOf(bytes);
  const rows = new Uint8Array((width + 1) * height);
  // Neighbouring pixels are mostly equal, so a colour is looked up only where it changes.
  let last = -1;
  let place = 0;
  for (let y = 0, at = 0; y < height; y++) {
    const row = y * (width + 1) + 1;
    for (let x = 0; x < width; x++, at += 4) {
      const colour = colourAt(bytes, at);
      if (colour !== last) {
        last = colour;
        place = places.get(colour) as number;
      }
      rows[row + x] = place;
    }
  }
  const head = Buffer.alloc(13);
  head.writeUInt32BE(width, 0);
  head.writeUInt32BE(height, 4);
  head.set([8, 3, 0, 0, 0], 8);
  return Buffer.concat([
    Buffer.from([137, 80, 78, 71, 13, 10, 26, 10]),
    chunk("IHDR", head),
    chunk(
      "PLTE",
      Uint8Array.from(palette.flatMap((colour) => [colour >> 16, (colour >> 8) & 255, colour & 255])),
    ),
    chunk("IDAT", deflateSync(rows, { level: 9 })),
    chunk("IEND", new Uint8Array()),
  ]);
}

function chunk(name: string, data: Uint8Array): Buffer {
  const body = Buffer.concat([Buffer.from(name, "latin1"), data]);
  const framed = Buffer.alloc(body.length + 8);
  framed.writeUInt32BE(data.length, 0);
  framed.set(body, 4);
  framed.writeUInt32BE(crc32(body), body.length + 4);
  return framed;
}

function colourAt(bytes: Uint8Array, at: number): number {
  return ((bytes[at] as number) << 16) | ((bytes[at + 1] as number) << 8) | (bytes[at + 2] as number);
}

/** The most frequent colours, and for every colour its index in this palette. */
function paletteOf(bytes: Uint8Array): { palette: number[]; places: Map<number, number> } {
  const counts = new Map<number, number>();
  let last = -1;
  let run = 0;
  for (let at = 0; at < bytes.length; at += 4, run++) {
    const colour = colourAt(bytes, at);
    if (colour === last) continue;
    counts.set(last, (counts.get(last) ?? 0) + run);
    last = colour;
    run = 0;
  }
  counts.set(last, (counts.get(last) ?? 0) + run);
  counts.delete(-1);
  // Ties are broken by the colour, so that the same picture gives the same bytes.
  const common = [...counts].sort((a, b) => b[1] - a[1] || a[0] - b[0]).map(([colour]) => colour);
  const palette = common.slice(0, colours);
  return {
    palette,
    places: new Map(common.map((colour, i) => [colour, i < colours ? i : nearest(palette, colour)])),
  };
}

function nearest(palette: readonly number[], colour: number): number {
  let best = 0;
  let least = Number.POSITIVE_INFINITY;
  palette.forEach((candidate, place) => {
    const distance = apart(candidate, colour);
    if (distance < least) {
      least = distance;
      best = place;
    }
  });
  return best;
}

function apart(a: number, b: number): number {
  const red = (a >> 16) - (b >> 16);
  const green = ((a >> 8) & 255) - ((b >> 8) & 255);
  const blue = (a & 255) - (b & 255);
  return red * red + green * green + blue * blue;
}
