import type { ForecastScores } from "../forecasts/forecast-scores.js";
import { isWorse } from "../forecasts/is-worse.js";
import { rollingOrigin } from "../forecasts/rolling-origin.js";
import type { Standing } from "./supported-rules.js";

/** How supported rules, fitted to the rows before it, forecast the last fifth of a record one period ahead. */
export interface HoldOut {
  /** [standings]: mean ranked probability score; undefined where the rule was not forecast. */
  readonly scores: readonly (number | undefined)[];
  readonly naive: { readonly name: string; readonly score: number };
  /** Values held out. */
  readonly values: number;
  /** [standings]: the naive forecast that did clearly better; undefined where none did. */
  readonly beatenBy: readonly (string | undefined)[];
}

/** Share of the record that is held out. */
const share = 0.2;
/** Standard errors by which a naive forecast must be ahead: with few values 2 would come up by chance. */
const clearly = 3;

/**
 * Fits the supported rules to all but the last fifth and forecasts each of its values from the row before it; undefined
 * where that cannot be done. One period ahead, because errors of longer forecasts go together and cannot be counted.
 */
export function holdOut(standings: readonly Standing[]): HoldOut | undefined {
  const supported = standings.filter((standing) => standing.supported);
  const rows = Math.min(
    ...supported.flatMap(({ tried }) => tried.fit.observations.groups.map((g) => g.index.length)),
  );
  const held = Math.round(share * rows);
  if (supported.length === 0 || held < 1) return undefined;
  const rolled = rollingOrigin(
    supported.map(({ tried }) => tried.fit),
    { leftOut: Array.from({ length: held }, (_, i) => held - i), horizon: 1, level: 0.8, fitOnce: true },
  );
  if (rolled === undefined) return undefined;
  const naive = rolled.scores.filter(({ kind }) => kind === "naive");
  const best = naive.reduce((low, next) => (next.crps < low.crps ? next : low));
  const scoreOf = (standing: Standing): ForecastScores | undefined => {
    const place = supported.indexOf(standing);
    return place < 0 ? undefined : rolled.scores[place];
  };
  return {
    scores: standings.map((standing) => scoreOf(standing)?.crps),
    naive: { name: best.name, score: best.crps },
    values: rolled.forecasts,
    beatenBy: standings.map((standing) => {
      const own = scoreOf(standing);
      return own && naive.find((other) => isWorse(own.each, other.each, clearly))?.name;
    }),
  };
}
