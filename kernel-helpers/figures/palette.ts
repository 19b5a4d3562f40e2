/** Style of a series: colour, dash and shape, never colour alone. */
export interface SeriesStyle {
  readonly colour: string;
  readonly dash: string;
  readonly symbol: string;
}

// Neighbouring styles differ in lightness as well as hue, for greyscale print and colour-blind readers; a test measures
// both.
const styles: readonly SeriesStyle[] = [
  { colour: "#123c5a", dash: "solid", symbol: "circle" },
  { colour: "#c2541a", dash: "9px,4px", symbol: "diamond" },
  { colour: "#00a0d6", dash: "2px,3px", symbol: "square" },
  { colour: "#3b0368", dash: "12px,3px,2px,3px", symbol: "triangle-up" },
  { colour: "#5d4f48", dash: "16px,5px", symbol: "cross" },
  { colour: "#0a958b", dash: "5px,3px,2px,3px,2px,3px", symbol: "triangle-down" },
];

/** The style of a series by its index; styles repeat after six. */
export function seriesStyle(number: number): SeriesStyle {
  return styles[number % styles.length] as SeriesStyle;
}

/** Number of different styles. */
export const styleCount: number = styles.length;

/** A transparent colour of the palette, for the inside of a band. */
export function tint(colour: string, share: number): string {
  const part = (at: number): number => Number.parseInt(colour.slice(at, at + 2), 16);
  return `rgba(${part(1)},${part(3)},${part(5)},${share})`;
}
