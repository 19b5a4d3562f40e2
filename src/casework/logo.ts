import { Resvg } from "@resvg/resvg-js";

/** The logo: readings at equal steps that approach a level, and the curve of a rule through them. */
export const logoSvg: string = [
  '<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 64 64">',
  '<rect width="64" height="64" rx="12" fill="#0b5a6b"/>',
  '<path d="M8 16h48" stroke="#9cc7c9" stroke-width="2" stroke-dasharray="3 4"/>',
  '<path d="M10 53C22 51 26 42 32 33S42 19 56 17" fill="none" stroke="#fffefb" stroke-width="4" stroke-linecap="round"/>',
  '<g fill="#f4b942" stroke="#0b5a6b" stroke-width="2">',
  '<circle cx="10" cy="53" r="5.5"/><circle cx="25" cy="43.5" r="5.5"/>',
  '<circle cx="39" cy="24" r="5.5"/><circle cx="54" cy="17.5" r="5.5"/></g></svg>',
].join("");

/** The logo as a square PNG of the given size in pixels. */
export function logoPng(size: number): Uint8Array {
  return new Resvg(logoSvg, { fitTo: { mode: "width", value: size } }).render().asPng();
}
