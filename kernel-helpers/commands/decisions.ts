import { type Reach, type ReachOptions, reaches as reachesValue } from "../../src/decision/index.js";
import type { Forecast, Simulation } from "../../src/projection/index.js";
import { showing, type Table, table } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { shownTogether } from "./shown-together.js";

/**
 * When a forecast state first reaches a value; the result shows time, margin, first recorded period and the
 * probability of never, and says it in a sentence.
 *
 * @example reaches(ahead, { state: "N", value: 120, direction: "rising" }).sentence;
 */
export function reaches(ahead: Forecast | Simulation, options: ReachOptions): Reach {
  const found = reachesValue(ahead, options);
  caseLog.noteStep(`asked when ${found.state} reaches ${found.value} ${found.unit}, ${found.direction}`);
  return showing({ ...found }, () => shownTogether([reachTable(found)]));
}

function reachTable(found: Reach): Table {
  const grouped = found.groups.length > 1;
  const time = { kind: "number", digits: 5, unit: found.periodUnit } as const;
  const percent = `${100 * found.level}%`;
  return table({
    title: `When ${found.state} reaches ${found.value} ${found.unit}`,
    columns: [
      ...(grouped ? [{ key: "group", label: "Group", kind: "text" } as const] : []),
      { key: "time", label: "On the fitted path", ...time },
      { key: "lower", label: `Interval ${percent}, from`, ...time },
      { key: "upper", label: "to", ...time },
      { key: "firstPeriod", label: "First recorded period", ...time },
      { key: "never", label: "Share of draws never there", kind: "probability", pairedWith: "neverError" },
    ],
    rows: found.groups.map((group) => ({
      ...group,
      time: group.time ?? "not reached",
      firstPeriod: group.firstPeriod ?? "not reached",
      lower: group.lower ?? "none",
      upper: group.upper ?? "none",
    })),
    notes: [`The interval carries the uncertainty of the ${found.margin}.`, found.sentence],
  });
}
