import { labelBetween } from "../../src/record/index.js";
import type { Axis, Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { significant } from "./number-text.js";

/** Text of a position on an axis: the label of its period if the axis has labels, otherwise the number. */
export function positionLabel({ periods }: Axis, place: number | string): string {
  if (typeof place === "string") return place;
  if (periods === undefined) return significant(place);
  return labelBetween(periods.axis, 0, (place - periods.zero) / periods.axis.step.every);
}

/** Round numbers of periods between ticks. */
const tickSteps = {
  months: [1, 2, 3, 6, 12, 24, 60, 120, 240, 600, 1200],
  others: [1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000],
};

/** Positions and labels of the ticks of an axis of labelled periods; undefined for any other axis. */
export function periodTicks(
  panel: Panel,
  columns: number,
): { readonly tickvals: readonly number[]; readonly ticktext: readonly string[] } | undefined {
  const { periods } = panel.x;
  const ends = axisRange(panel);
  if (periods === undefined || ends === undefined) return undefined;
  const { axis, zero } = periods;
  const [first, last] = ends.map((place) => (place - zero) / axis.step.every) as [number, number];
  const room = Math.max(2, Math.floor(columns / (positionLabel(panel.x, ends[1]).length + 3)));
  const choices = axis.counts === "months" && axis.stride === 1 ? tickSteps.months : tickSteps.others;
  const fitting = choices.find((each) => (last - first) / each <= room);
  const stride = fitting ?? Math.ceil((last - first) / room);
  const start = Math.ceil(first);
  const count = Math.max(0, Math.floor((last - start) / stride) + 1);
  const tickvals = Array.from({ length: count }, (_, k) => zero + (start + k * stride) * axis.step.every);
  return { tickvals, ticktext: tickvals.map((place) => positionLabel(panel.x, place)) };
}

/** Smallest and largest position drawn in a panel; undefined if it draws none. */
function axisRange({ x, layers }: Panel): readonly [number, number] | undefined {
  if (x.ends !== undefined) return x.ends;
  const places = layers.flatMap(positionsOf).filter((place) => !Number.isNaN(place));
  if (places.length === 0) return undefined;
  return [places.reduce((a, b) => Math.min(a, b)), places.reduce((a, b) => Math.max(a, b))];
}

function positionsOf(layer: Layer): readonly number[] {
  if (!("x" in layer)) return [];
  return typeof layer.x === "object" ? Array.from<unknown, number>(layer.x, Number) : [Number(layer.x)];
}
