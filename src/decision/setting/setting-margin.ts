import {
  blockStreams,
  type DrawnStarts,
  drawnStarts,
  type Ground,
  unknownsDraw,
} from "../../projection/index.js";
import type { SettingMargin, Target } from "../choice/solution.js";
import { isProbability, type Measure, placedMeasure } from "../measure/measure.js";
import { pathReader } from "../measure/path-values.js";
import { readingOf } from "../measure/read-measure.js";
import type { DecisionContext } from "./decision-context.js";
import type { Choice, Setting } from "./set-value.js";

/** Draws of the parameters, and paths of each where chance moves them. */
const draws = 400;
const pathsEach = 48;

/** How often the place of a limit is halved. */
const halvings = 14;

/**
 * A measure on every draw of a fit's parameters: its mean or quantile over the paths of that draw, or on its one path
 * without random change.
 */
export function drawReader(
  context: DecisionContext,
  asked: Measure,
  count: number = draws,
  still: boolean = false,
): (choice?: Choice) => Float64Array {
  const { ground, rule } = context;
  const measure = placedMeasure(asked, rule, ground.periods - ground.present);
  const each = context.random && !still ? pathsEach : 1;
  const paths = pathReader(context, measure, { draws: count, each, still });
  return (choice) => {
    const { values } = paths(choice);
    return Float64Array.from({ length: count }, (_, k) => {
      const own = values.subarray(k * each, (k + 1) * each);
      return own.length === 1 ? own[0]! : readingOf(measure, { values: own, left: 0 }).value;
    });
  };
}

/**
 * Between which settings the target is met at drawn parameters: at the lower limit it has been met, coming from below,
 * by (1 - level)/2 of the draws, at the upper by all but that many. Every draw has its own history, and then the setting.
 * Undefined for a rule, whose parameters are given, and for a probability or a quantile, which carries what is open of them.
 */
export function settingMargin(
  context: DecisionContext,
  setting: Setting,
  target: Target,
  root: number,
  level: number,
): SettingMargin | undefined {
  const carried = isProbability(target) || ("quantile" in target && target.quantile !== undefined);
  if (context.fit === undefined || carried || "parameter" in target) return undefined;
  const aim = target.is ?? target.atMost ?? target.atLeast ?? 0;
  const read = drawReader(context, target);
  const scale = Math.abs(root) || 1;
  const [low, high] = setting.bounds;
  const place = (by: number): number => Math.min(high, Math.max(low, root + by * scale));
  const change = (by: number): number =>
    rises(read({ setting, value: place(-by) }), read({ setting, value: place(by) }));
  const sign = [2 ** -6, 2 ** -3, 0.5].map(change).find((found) => found !== 0) ?? 1;
  const crossedBy = (value: number): number => {
    const found = read({ setting, value });
    return found.filter((each) => sign * (each - aim) >= 0).length / found.length;
  };
  const tail = (1 - level) / 2;
  const without = Math.max(0, 1 - (crossedBy(place(4)) - crossedBy(place(-4))));
  return {
    lower: limitOf(crossedBy, place, -1, tail),
    upper: limitOf(crossedBy, place, 1, 1 - tail),
    without,
  };
}

/** 1 where the measure of most draws rises from one setting to the other, -1 where it falls. */
function rises(below: Float64Array, above: Float64Array): number {
  return Math.sign(above.reduce((sum, value, k) => sum + (Math.sign(value - below[k]!) || 0), 0));
}

/** The setting at which a share of the draws has met the target, looked for in growing steps to one side. */
function limitOf(
  crossedBy: (value: number) => number,
  place: (by: number) => number,
  side: 1 | -1,
  share: number,
): number | undefined {
  const beyond = (by: number): boolean => side * (crossedBy(place(by)) - share) >= 0;
  let near = 0;
  for (let k = -8; k <= 2; k++) {
    let far = side * 2 ** k;
    if (!beyond(far)) {
      near = far;
      continue;
    }
    for (let n = 0; n < halvings; n++) {
      const middle = 0.5 * (near + far);
      if (beyond(middle)) far = middle;
      else near = middle;
    }
    return place(far);
  }
  return undefined;
}

/** Grounds with the fit's unknowns drawn, and the factor through which each draw's record reads the states. */
export function drawnGrounds(
  context: DecisionContext,
  count: number,
): { readonly grounds: readonly Ground[]; readonly factors: DrawnStarts["factors"] } {
  const ground = context.fitGround!;
  const source = unknownsDraw(context.fit!, ground.group);
  const streams = blockStreams(context.stream(), count).map((each) => each.jump());
  const starts = drawnStarts(context.fit!, ground, source, count, streams);
  const width = ground.initial.length;
  const grounds = Array.from({ length: count }, (_, path) => ({
    ...ground,
    parameters: starts.parameters.slice(path * starts.size, (path + 1) * starts.size),
    initial: starts.initial.slice(path * width, (path + 1) * width),
  }));
  return { grounds, factors: starts.factors };
}
