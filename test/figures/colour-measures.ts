/** Measures of colours, from the standards, for tests of what is shown. */

type Triple = readonly [number, number, number];

/** Linear light of an sRGB colour. Source: IEC 61966-2-1. */
export function linear(hex: string): Triple {
  const part = (at: number): number => {
    const share = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  };
  return [part(1), part(3), part(5)];
}

/** Relative luminance. Source: W3C, WCAG 2.1, definition. */
export function luminance([red, green, blue]: Triple): number {
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

/** Contrast ratio. Source: W3C, WCAG 2.1, definition. */
export function contrast(a: string, b: string): number {
  const [dark, light] = [luminance(linear(a)), luminance(linear(b))].sort((x, y) => x - y) as [
    number,
    number,
  ];
  return (light + 0.05) / (dark + 0.05);
}

/** CIE 1976 L*a*b*, D65. Source: CIE 15. */
export function lab([red, green, blue]: Triple): Triple {
  const x = 0.4124 * red + 0.3576 * green + 0.1805 * blue;
  const z = 0.0193 * red + 0.1192 * green + 0.9505 * blue;
  const root = (t: number): number => (t > 0.008856 ? Math.cbrt(t) : 7.787 * t + 16 / 116);
  const fy = root(luminance([red, green, blue]));
  return [116 * fy - 16, 500 * (root(x / 0.9505) - fy), 200 * (fy - root(z / 1.089))];
}

/**
 * Linear light as seen without one kind of cone. Source: Machado, Oliveira and Fernandes (2009), A
 * physiologically-based model for simulation of color vision deficiency, matrices of severity 1.0 (from memory).
 */
export const deficiencies: Readonly<Record<string, readonly [Triple, Triple, Triple]>> = {
  deuteranopia: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  protanopia: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
};

export function seenWith(rows: readonly [Triple, Triple, Triple], colour: Triple): Triple {
  const dot = (row: Triple): number => row[0] * colour[0] + row[1] * colour[1] + row[2] * colour[2];
  return [dot(rows[0]), dot(rows[1]), dot(rows[2])];
}
