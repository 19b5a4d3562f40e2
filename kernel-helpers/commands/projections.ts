import type { Fit } from "../../src/estimate/index.js";
import {
  type Forecast,
  type ForecastOptions,
  forecast as forecastFit,
  type GroupForecast,
} from "../../src/projection/index.js";
import { type Figure, fanFigure, type ProjectedSeries } from "../figures/index.js";
import { withProgress } from "../progress/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { cautionsByGroup } from "./cautions-by-group.js";
import { shownTogether } from "./shown-together.js";

/**
 * Carries a fit forward; the result shows the path with its bands and the numbers at the recorded periods ahead.
 *
 * The seed is the case's unless one is given.
 *
 * @example forecast(fitted, { periods: 20 });
 */
export function forecast(fit: Fit, options: ForecastOptions): Forecast {
  const ahead = withProgress("Forecast", undefined, ({ at }) =>
    forecastFit(fit, { seed: caseLog.seed(), onProgress: at, ...options }),
  );
  caseLog.noteStep(
    `forecast "${fit.rule.text}" over ${options.periods} periods, ${ahead.options.paths} paths`,
  );
  return showing({ ...ahead }, () => shownTogether([...fanCharts(ahead), aheadTable(ahead)]));
}

function fanCharts(ahead: Forecast): Figure[] {
  const { observations, rule } = ahead.fit;
  return observations.states.map((state) =>
    fanFigure({
      title: `Forecast of ${rule.text}`,
      x: { title: observations.period.column, unit: observations.period.unit },
      y: { title: state.name, unit: state.unit },
      series: ahead.groups.map((group) => projected(ahead, group, state.name)),
      notes: notesOf(ahead),
    }),
  );
}

function projected(ahead: Forecast, group: GroupForecast, name: string): ProjectedSeries {
  const state = group.states.find((each) => each.state === name)!;
  const recorded = ahead.fit.observations.groups.find((each) => each.name === group.group)!;
  const x = group.time;
  return {
    name: group.group,
    recorded: { name: "recorded", x: recorded.time, y: recorded.values[name]! },
    central: { name: "fitted path", x, y: state.central },
    bands: state.bands
      .filter((band) => band.kind === "future observation")
      .map(({ level, kind, lower, upper }) => ({ level, of: kind, x, lower, upper })),
    recordEnd: x[group.index.indexOf(group.recordEnd)]!,
  };
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
    ...cautionsByGroup(ahead.groups),
  ];
}
