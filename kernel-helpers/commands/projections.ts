import type { Fit } from "../../src/estimate/index.js";
import {
  type Forecast,
  type ForecastOptions,
  forecast as forecastFit,
  type GroupForecast,
} from "../../src/projection/index.js";
import { type Figure, figure, type Layer, type Panel } from "../figures/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { shownTogether } from "./shown-together.js";

/**
 * Carries a fit forward; the result shows the path with its bands and the numbers at the recorded periods ahead.
 *
 * The seed is the case's unless one is given.
 *
 * @example forecast(fitted, { periods: 20 });
 */
export function forecast(fit: Fit, options: ForecastOptions): Forecast {
  const ahead = forecastFit(fit, { seed: caseLog.seed(), ...options });
  caseLog.noteStep(
    `forecast "${fit.rule.text}" over ${options.periods} periods, ${ahead.options.paths} paths`,
  );
  return showing({ ...ahead }, () => shownTogether([fanChart(ahead), aheadTable(ahead)]));
}

function fanChart(ahead: Forecast): Figure {
  const { observations } = ahead.fit;
  const panels = ahead.groups.flatMap((group) =>
    group.states.map(
      (state, s): Panel => ({
        title: group.group,
        x: { title: observations.period.column, unit: observations.period.unit },
        y: { title: state.state, unit: state.unit },
        layers: layersOf(ahead, group, s),
      }),
    ),
  );
  return figure({ title: `Forecast of ${ahead.fit.rule.text}`, panels, notes: notesOf(ahead) });
}

function layersOf(ahead: Forecast, group: GroupForecast, place: number): Layer[] {
  const state = group.states[place]!;
  const recorded = ahead.fit.observations.groups.find((each) => each.name === group.group)!;
  const bands = state.bands
    .filter((band) => band.kind === "future observation")
    .sort((a, b) => b.level - a.level)
    .map(
      (band, nested): Layer => ({
        mark: "band",
        name: `${100 * band.level}% future observation`,
        x: group.time,
        lower: band.lower,
        upper: band.upper,
        nested,
      }),
    );
  return [
    ...bands,
    { mark: "line", name: "fitted path", x: group.time, y: state.central },
    { mark: "points", name: "recorded", x: recorded.time, y: recorded.values[state.state]! },
    { mark: "vertical", name: "record ends", x: group.time[group.index.indexOf(group.recordEnd)]! },
  ];
}

function aheadTable(ahead: Forecast): Table {
  const grouped = ahead.groups.length > 1;
  const level = Math.max(...ahead.options.levels);
  const rows = ahead.groups.flatMap((group) =>
    group.states.flatMap((state) => {
      const mean = state.bands.find((band) => band.kind === "mean path" && band.level === level)!;
      const future = state.bands.find((band) => band.kind === "future observation" && band.level === level)!;
      return group.index.flatMap((index, t) =>
        index <= group.recordEnd
          ? []
          : {
              group: group.group,
              time: group.time[t],
              central: state.central[t],
              meanLower: mean.lower[t],
              meanUpper: mean.upper[t],
              futureLower: future.lower[t],
              futureUpper: future.upper[t],
            },
      );
    }),
  );
  const unit = ahead.groups[0]?.states[0]?.unit ?? "";
  const number = { kind: "number", digits: 4, unit } as const;
  const percent = `${100 * level}%`;
  return table({
    title: "Periods ahead",
    columns: [
      ...(grouped ? [{ key: "group", label: "Group", kind: "text" } as const] : []),
      { key: "time", label: ahead.fit.observations.period.column, kind: "number", digits: 6 },
      { key: "central", label: "Fitted path", ...number },
      { key: "meanLower", label: `Mean path ${percent}, from`, ...number },
      { key: "meanUpper", label: "to", ...number },
      { key: "futureLower", label: `Future observation ${percent}, from`, ...number },
      { key: "futureUpper", label: "to", ...number },
    ],
    rows,
    limit: 24,
    notes: notesOf(ahead),
  });
}

function notesOf(ahead: Forecast): string[] {
  const { paths, seed } = ahead.options;
  return [
    "Mean path: uncertainty of the constants. Future observation: that and the error of a single value.",
    `${paths} drawn paths, seed ${seed}; quantiles by definition 7.`,
    ...ahead.groups.flatMap((group) =>
      group.warnings.map((w) => `Caution: ${group.group === "" ? "" : `${group.group}: `}${w.message}`),
    ),
  ];
}
