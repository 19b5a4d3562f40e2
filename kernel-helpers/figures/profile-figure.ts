import { type Figure, figure, type Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { smoothProfile } from "./smooth-profile.js";

/** How the fit worsens as one parameter is held away from its estimate. */
export interface DrawnProfile {
  readonly parameter: string;
  /** "" = none. */
  readonly unit: string;
  /** Values the parameter was held at, increasing. */
  readonly held: ArrayLike<number>;
  /** The measure of worsening at each, 0 at the estimate. */
  readonly worsening: ArrayLike<number>;
  readonly estimate: number;
  /** Ends of the interval; undefined where it has none. */
  readonly lower: number | undefined;
  readonly upper: number | undefined;
}

/** What `profileFigure` draws. */
export interface ProfileFigureOptions {
  readonly title: string;
  readonly profiles: readonly DrawnProfile[];
  /** What worsening is measured by, for the upright axis: "F", "2 × fall of log-likelihood". */
  readonly measure: string;
  /** Worsening at the ends of the interval. */
  readonly cut: number;
  /** "95%" */
  readonly level: string;
  readonly notes?: readonly string[];
}

/** A profile is drawn up to so many times its cut-off. */
const heights = 2.6;

/**
 * Profiles of parameters, a panel each, with the cut-off and the interval it gives. The line between the computed
 * places is an arc (its signed root is drawn straight); an arrow at the cut-off says that
 * the record sets no limit on that side.
 */
export function profileFigure(options: ProfileFigureOptions): Figure {
  const { title, profiles, measure, cut, level, notes = [] } = options;
  const alone = profiles.length === 1;
  const panels = profiles.map(
    (profile): Panel => ({
      title: alone ? "" : profile.parameter,
      x: { title: profile.parameter, unit: profile.unit },
      y: { title: measure, ends: [0, heights * cut] },
      layers: profileLayers(profile, cut, level),
    }),
  );
  return figure({ title, panels, notes: [...profiles.flatMap(openEnds), ...notes] });
}

function profileLayers(profile: DrawnProfile, cut: number, level: string): Layer[] {
  const { held, worsening, estimate, lower, upper } = profile;
  const curve = smoothProfile(profile, heights * cut);
  const first = curve.x[0] ?? estimate;
  const last = curve.x.at(-1) ?? estimate;
  const shown = Array.from(held, (x, i) => ({ x, y: worsening[i] as number })).filter(
    ({ x, y }) => x >= first && x <= last && y <= heights * cut,
  );
  const ends = [lower, upper].filter((end) => end !== undefined);
  return [
    { mark: "line", name: "profile", ...curve, style: 0 },
    { mark: "points", name: "computed", x: shown.map(({ x }) => x), y: shown.map(({ y }) => y), style: 0 },
    { mark: "threshold", name: `cut-off ${level}`, y: cut, style: 1 },
    { mark: "vertical", name: "estimate", x: estimate, style: 4 },
    ...ends.map((x): Layer => ({ mark: "vertical", name: "end of interval", x, style: 3, inLegend: false })),
    ...(lower === undefined ? [noLimit(first, cut, "left")] : []),
    ...(upper === undefined ? [noLimit(last, cut, "right")] : []),
  ];
}

function noLimit(x: number, y: number, towards: "left" | "right"): Layer {
  return {
    mark: "arrow",
    name: towards === "left" ? "no lower limit" : "no upper limit",
    x,
    y,
    towards,
    style: 3,
  };
}

function openEnds({ parameter, lower, upper }: DrawnProfile): string[] {
  if (lower !== undefined && upper !== undefined) return [];
  const side =
    lower === undefined && upper === undefined ? "either side" : lower === undefined ? "below" : "above";
  return [`This record sets no limit on ${parameter} ${side}.`];
}
