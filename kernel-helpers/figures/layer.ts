/** Positions on an axis: numbers, or names and ISO dates on a category or date axis. */
export type Places = ArrayLike<number> | readonly string[];

interface Named {
  /** Shown in the legend and in the text alternative. */
  readonly name: string;
  /** Index of the style (colour, dash and shape) in the palette. Default: the index of the layer in its panel. */
  readonly style?: number;
  /** Default true. */
  readonly inLegend?: boolean;
}

/** Separate values. `lower` and `upper` draw error bars. */
export interface PointsLayer extends Named {
  readonly mark: "points";
  readonly x: Places;
  readonly y: Places;
  readonly lower?: ArrayLike<number>;
  readonly upper?: ArrayLike<number>;
  /** "plain": the shape of the style; "open": the same, hollow; "flag": a large hollow diamond around a flagged value. */
  readonly variant?: "plain" | "open" | "flag";
  /** Drawn larger than readings, for equilibria and other special points. */
  readonly large?: boolean;
  /** Drawn smaller, for figures with many frames. */
  readonly small?: boolean;
}

/** Values joined in order; NaN leaves a gap. */
export interface LineLayer extends Named {
  readonly mark: "line";
  readonly x: Places;
  readonly y: ArrayLike<number>;
  /** Dashed, whatever the style. */
  readonly dashed?: boolean;
  /** Drawn as steps: each value is kept until the next position. */
  readonly stepped?: boolean;
  /** Thin and solid, for frames and baselines. */
  readonly thin?: boolean;
}

/** The area between two lines. Give its level in the name: "80% prediction". */
export interface BandLayer extends Named {
  readonly mark: "band";
  readonly x: Places;
  readonly lower: ArrayLike<number>;
  readonly upper: ArrayLike<number>;
  /** 0 for the outermost of nested bands, then 1, 2: dotted, dashed and solid edges. Default 0. */
  readonly nested?: number;
}

/** A horizontal line across the whole panel, with a label. */
export interface ThresholdLayer extends Named {
  readonly mark: "threshold";
  readonly y: number;
}

/** A vertical line across the whole panel, with a label. */
export interface VerticalLayer extends Named {
  readonly mark: "vertical";
  readonly x: number | string;
}

/** Bars from zero, vertical or horizontal (then `x` has the lengths and `y` the names). */
export interface BarsLayer extends Named {
  readonly mark: "bars";
  readonly x: Places;
  readonly y: Places;
  readonly horizontal?: boolean;
}

/** An arrow for something that continues without limit. */
export interface ArrowLayer extends Named {
  readonly mark: "arrow";
  readonly x: number;
  readonly y: number;
  readonly direction: "left" | "right" | "up" | "down";
}

/** A text label below and to the right of a point. */
export interface LabelLayer extends Named {
  readonly mark: "label";
  readonly x: number;
  readonly y: number;
}

/** One layer of a panel. */
export type Layer =
  | PointsLayer
  | LineLayer
  | BandLayer
  | ThresholdLayer
  | VerticalLayer
  | BarsLayer
  | ArrowLayer
  | LabelLayer;
