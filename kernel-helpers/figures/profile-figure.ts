import { type Figure, figure, type Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { smoothProfile } from "./smooth-profile.js";

/** Profile of one parameter: how the fit criterion increases away from the estimate. */
export interface ProfileCurve {
  readonly parameter: string;
  /** "" = none. */
  readonly unit: string;
  /** Values at which the parameter was fixed, increasing. */
  readonly values: ArrayLike<number>;
  /** Increase of the criterion at each value; 0 at the estimate. */
  readonly increase: ArrayLike<number>;
  readonly estimate: number;
  /** Limits of the interval; undefined where there is none. */
  readonly lower: number | undefined;
  readonly upper: number | undefined;
}

/** Options of `profileFigure`. */
export interface ProfileFigureOptions {
  readonly title: string;
  readonly profiles: readonly ProfileCurve[];
  /** The criterion, for the vertical axis: "F", "2 Δ log-likelihood". */
  readonly measure: string;
  /** Increase at the limits of the interval. */
  readonly cut: number;
  /** "95%" */
  readonly level: string;
  readonly notes?: readonly string[];
}

/** A profile is drawn up to this multiple of its cut-off. */
const heightFactor = 2.6;

/**
 * Profiles of parameters, one panel each, with the cut-off and the interval. The signed root of the profile is
 * interpolated linearly between the computed points; an arrow at the cut-off means that the record sets no limit on that
 * side.
 */
export function profileFigure(options: ProfileFigureOptions): Figure {
  const { title, profiles, measure, cut, level, notes = [] } = options;
  const alone = profiles.length === 1;
  const panels = profiles.map(
    (profile): Panel => ({
      title: alone ? "" : profile.parameter,
      x: { title: profile.parameter, unit: profile.unit },
      y: { title: measure, ends: [0, heightFactor * cut] },
      layers: profileLayers(profile, cut, level),
    }),
  );
  return figure({ title, panels, notes: [...profiles.flatMap(openEndNotes), ...notes] });
}

function profileLayers(profile: ProfileCurve, cut: number, level: string): Layer[] {
  const { values, increase, estimate, lower, upper } = profile;
  const curve = smoothProfile(profile, heightFactor * cut);
  const first = curve.x[0] ?? estimate;
  const last = curve.x.at(-1) ?? estimate;
  const shown = Array.from(values, (x, i) => ({ x, y: increase[i] as number })).filter(
    ({ x, y }) => x >= first && x <= last && y <= heightFactor * cut,
  );
  const ends = [lower, upper].filter((end) => end !== undefined);
  return [
    { mark: "line", name: "profile", ...curve, style: 0 },
    {
      mark: "points",
      name: "computed points",
      x: shown.map(({ x }) => x),
      y: shown.map(({ y }) => y),
      style: 0,
    },
    { mark: "threshold", name: `${level} cut-off`, y: cut, style: 1 },
    { mark: "vertical", name: "estimate", x: estimate, style: 4 },
    ...ends.map((x): Layer => ({ mark: "vertical", name: "interval limit", x, style: 3, inLegend: false })),
    ...(lower === undefined ? [noLimit(first, cut, "left")] : []),
    ...(upper === undefined ? [noLimit(last, cut, "right")] : []),
  ];
}

function noLimit(x: number, y: number, direction: "left" | "right"): Layer {
  return {
    mark: "arrow",
    name: direction === "left" ? "no lower limit" : "no upper limit",
    x,
    y,
    direction,
    style: 3,
  };
}

function openEndNotes({ parameter, lower, upper }: ProfileCurve): string[] {
  if (lower !== undefined && upper !== undefined) return [];
  const limit =
    lower === undefined && upper === undefined
      ? "lower or upper limit"
      : lower === undefined
        ? "lower limit"
        : "upper limit";
  return [`The record determines no ${limit} for ${parameter}.`];
}
