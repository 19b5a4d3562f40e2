import type { TimeToReach as EngineTimeToReach, GroupReach } from "../../src/decision/index.js";
import { attachGroups } from "./attach.js";

/** What is asked most of a single group; left out of listings and copies of the result. */
type SingleReach = Pick<GroupReach, (typeof members)[number]>;

/** When a state reaches a level, with its margin; the times by themselves are those of its only group and scenario. */
export type TimeToReach = EngineTimeToReach &
  SingleReach & {
    /** A group or scenario by its name; of several scenarios for several groups by both, as "flask A, rate 5%". */
    readonly group: (name: string) => GroupReach;
  };

const members = ["time", "firstPeriod", "lower", "upper", "median", "never", "words"] as const;

/** Gives an answer the shortcuts to the times of its only group. */
export function withSingleReach(found: EngineTimeToReach): TimeToReach {
  attachGroups(found, "answer", found.groups, members);
  return found as TimeToReach;
}
