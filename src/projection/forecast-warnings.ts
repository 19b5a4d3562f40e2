import type { GroupFit } from "../estimate/index.js";
import type { Warning } from "../numeric/index.js";
import type { StateBound } from "../rule/index.js";
import type { CentralPath } from "./central-path.js";
import type { BoundsPassed } from "./first-passage.js";
import type { FitGround } from "./fit-ground.js";
import type { DrawnStarts } from "./parameters/drawn-starts.js";
import type { Predictability } from "./predictability.js";
import { rangeWarnings } from "./range-warnings.js";
import { recordedSignWarnings } from "./recorded-sign.js";

/** What the warnings are read from. */
export interface WarningSource {
  readonly group: GroupFit;
  readonly ground: FitGround;
  readonly starts: DrawnStarts;
  readonly central: CentralPath;
  readonly left: number;
  /** By state. */
  readonly bounds: readonly StateBound[];
  /** By state: where paths passed a bound. */
  readonly passed: readonly BoundsPassed[];
  readonly predictability: Predictability | undefined;
  /** "" for the only one. */
  readonly scenario: string;
  /** A row's period in words. */
  readonly period: (row: number) => string;
  /** Periods asked for beyond the record. */
  readonly asked: number;
}

/** Share of positive exponents from which a reader is told. */
const worthTelling = 0.05;

/** What a reader of a forecast must know. */
export function forecastWarnings(source: WarningSource): Warning[] {
  const { starts, ground } = source;
  return [
    ...startedEarlier(source),
    ...openParameters(source),
    ...discardedDraws(starts),
    ...rangeWarnings({ ...source, rule: ground.rule, paths: starts.paths }),
    ...recordedSignWarnings(source),
    ...beyondRecord(source),
    ...partingPaths(source.predictability),
  ];
}

function startedEarlier({ ground, period }: WarningSource): Warning[] {
  const { recorded, recordEnd, from } = ground;
  if (recordEnd === recorded.index[recorded.index.length - 1]) return [];
  return [
    {
      code: "starts-inside-record",
      message: `The forecast starts after ${period(recordEnd - from)}; its parameters were estimated from the whole record, later rows included.`,
    },
  ];
}

function openParameters({ group, starts }: WarningSource): Warning[] {
  const open = group.estimates.filter(({ standardError }) => standardError === undefined);
  const parameters = open.filter(({ role }) => role !== "scale");
  const names = parameters.map(({ name }) => name).join(", ");
  const spreads = open.filter(({ role }) => role === "scale").map(({ name }) => name);
  const held: Warning[] =
    spreads.length === 0
      ? []
      : [
          {
            code: "spreads-held",
            message: `The record determines ${spreads.join(" and ")} only on one side: the bands hold ${spreads.length === 1 ? "it" : "them"} at the estimate${group.filter ? "; they rest on both errors together, which the record determines better than either" : ""}.`,
          },
        ];
  if (parameters.length === 0) return held;
  return [
    ...held,
    {
      code: "parameters-not-determined",
      message: `The record does not determine ${names}: parameters were drawn ${starts.method}${starts.followed === undefined ? "" : ` of ${starts.followed}`}, and where the bands have no end the record gives none.`,
    },
  ];
}

function discardedDraws({ discarded, paths }: DrawnStarts): Warning[] {
  if (discarded <= 0.01 * paths) return [];
  return [
    {
      code: "draws-discarded",
      message: `${discarded} draws were discarded because a parameter left its bounds or the path through the record its range, for ${paths} kept: near a bound the bands are cut.`,
    },
  ];
}

function beyondRecord({ asked, ground }: WarningSource): Warning[] {
  const observed = ground.recordEnd;
  if (asked <= observed) return [];
  return [
    {
      code: "longer-than-record",
      message: `Projection of ${asked} ${asked === 1 ? "period" : "periods"} from ${observed} observed: treat beyond ${observed} as conditional.`,
    },
  ];
}

function partingPaths(found: Predictability | undefined): Warning[] {
  if (found === undefined || found.chaotic < worthTelling) return [];
  const share = `P(exponent > 0) = ${found.chaotic.toFixed(2)} (Monte-Carlo error ${found.chaoticError.toPrecision(1)})`;
  if (found.predictionHorizon === undefined)
    return [
      {
        code: "perhaps-chaotic",
        message: `${share}: nearby paths may part, so read the bands and not the path.`,
      },
    ];
  const { lower, upper } = found.longRun!;
  return [
    {
      code: "chaotic",
      message:
        `Long-range point projection is meaningless when the exponent is positive; ${share}. The point path ends ` +
        `${found.predictionHorizon} periods ahead; after that 95% of values lie from ${lower.toPrecision(3)} to ${upper.toPrecision(3)}, whatever the start.`,
    },
  ];
}
