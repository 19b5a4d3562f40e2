import { type InputPlans, isByGroup } from "../../dynamics/index.js";
import type { Fit } from "../../estimate/index.js";
import { inputByPeriod, type Observations, periodsAfter } from "../../record/index.js";
import type { ForecastOptions } from "../forecast-options.js";
import { refuseSharedPlan, refuseStrangeGroup } from "../refusals.js";

/**
 * Refuses one plan for groups that have had inputs of their own, and plans for groups that the fit does not have.
 *
 * A driver that all groups share, such as the weather, is told by equal values in the periods that groups have in common.
 *
 * @throws {ModelError} `plan-not-by-group` | `plan-not-readable`.
 */
export function checkPlansByGroup({ rule, observations, groups }: Fit, plans: InputPlans): void {
  const names = groups.map(({ group }) => group);
  for (const [input, plan] of Object.entries(plans)) {
    if (isByGroup(plan)) refuseStrangers(`Invalid plan for \`${input}\``, plan.byGroup, names);
    else if (names.length > 1 && rule.inputs.includes(input)) {
      const last = ownLastValues(observations, input);
      if (last !== undefined) throw refuseSharedPlan(input, last);
    }
  }
}

/** @throws {ModelError} `plan-not-readable` where a start is given for a group that the fit does not have. */
export function checkStartsByGroup({ groups }: Fit, from: ForecastOptions["from"]): void {
  if (typeof from !== "object") return;
  refuseStrangers(
    "Option `from`",
    from.byGroup,
    groups.map(({ group }) => group),
  );
}

function refuseStrangers(where: string, byGroup: object, names: readonly string[]): void {
  const strange = Object.keys(byGroup).find((name) => !names.includes(name));
  if (strange !== undefined) throw refuseStrangeGroup(where, strange, names);
}

/** The last recorded value of each group, where groups have values of their own and these differ in the end. */
function ownLastValues(observations: Observations, input: string): ReadonlyMap<string, number> | undefined {
  const common = new Map<number, number>();
  const last = new Map<string, number>();
  let isShared = true;
  for (const group of observations.groups) {
    const before = periodsAfter(observations.axis, group.axis) ?? 0;
    inputByPeriod(group, input).forEach((value, index) => {
      if (Number.isNaN(value)) return;
      const other = common.get(before + index) ?? value;
      if (other !== value) isShared = false;
      common.set(before + index, value);
      last.set(group.name, value);
    });
  }
  return isShared || new Set(last.values()).size < 2 ? undefined : last;
}
