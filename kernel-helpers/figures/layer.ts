/** Places along an axis: numbers, or names and ISO dates on an axis that is scaled so. */
export type Places = ArrayLike<number> | readonly string[];

interface Named {
  /** Shown in the legend and in the text alternative. */
  readonly name: string;
  /** Which of the palette's styles (colour, dash and shape together); default: the layer's turn in its panel. */
  readonly style?: number;
  /** Default true. */
  readonly inLegend?: boolean;
}

/** Separate values. `lower` and `upper` draw a bar through each. */
export interface PointsLayer extends Named {
  readonly mark: "points";
  readonly x: Places;
  readonly y: Places;
  readonly lower?: ArrayLike<number>;
  readonly upper?: ArrayLike<number>;
  /** "plain" by its style's shape; "open" the same, hollow; "flag" a large hollow diamond around a flagged value. */
  readonly look?: "plain" | "open" | "flag";
  /** Drawn larger than readings are: equilibria, marks of a kind of their own. */
  readonly large?: boolean;
  /** Drawn smaller, for many frames in one figure. */
  readonly small?: boolean;
}

/** Values joined in their order; NaN breaks the line. */
export interface LineLayer extends Named {
  readonly mark: "line";
  readonly x: Places;
  readonly y: ArrayLike<number>;
  /** Drawn broken whatever its style says. */
  readonly dashed?: boolean;
  /** Drawn in steps: the value holds until the next place. */
  readonly stepped?: boolean;
  /** Drawn hair-thin and whole: frames and baselines. */
  readonly thin?: boolean;
}

/** The area between two lines. Name its level: "80% prediction". */
export interface BandLayer extends Named {
  readonly mark: "band";
  readonly x: Places;
  readonly lower: ArrayLike<number>;
  readonly upper: ArrayLike<number>;
  /** 0 for the outermost band of a nest, then 1, 2: the edges are dotted, broken, whole. Default 0. */
  readonly nested?: number;
}

/** A level across the whole panel, labelled at its end. */
export interface ThresholdLayer extends Named {
  readonly mark: "threshold";
  readonly y: number;
}

/** A place on the horizontal axis marked from bottom to top. */
export interface VerticalLayer extends Named {
  readonly mark: "vertical";
  readonly x: number | string;
}

/** Bars from zero, upright or lying (then `x` holds the lengths and `y` the names). */
export interface BarsLayer extends Named {
  readonly mark: "bars";
  readonly x: Places;
  readonly y: Places;
  readonly lying?: boolean;
}

/** An arrow that says: this goes on without end. */
export interface ArrowLayer extends Named {
  readonly mark: "arrow";
  readonly x: number;
  readonly y: number;
  readonly towards: "left" | "right" | "up" | "down";
}

/** Words at a place, beginning there and hanging below it. */
export interface LabelLayer extends Named {
  readonly mark: "label";
  readonly x: number;
  readonly y: number;
}

/** One thing drawn on a panel. */
export type Layer =
  | PointsLayer
  | LineLayer
  | BandLayer
  | ThresholdLayer
  | VerticalLayer
  | BarsLayer
  | ArrowLayer
  | LabelLayer;
