import type { Fit } from "../../estimate/index.js";
import type { Rule } from "../../rule/index.js";
import { refuseNoSuchSetting } from "../refusals.js";
import { isFit, type StandingOptions, stateOf } from "./standing.js";

/**
 * Options under which a name can be set, refused where nothing has that name. An input that is to be set needs no plan of
 * its own: it begins at the lower end of its range.
 */
export function withUnplanned<T extends StandingOptions>(
  subject: Fit | Rule,
  options: T,
  name: string,
  between: readonly [number, number] | undefined,
): T {
  const { inputs = {} } = options;
  const rule = isFit(subject) ? subject.rule : subject;
  const settable = [...rule.parameters, ...rule.states.map((state) => `${state}[0]`), ...rule.inputs];
  if (!settable.includes(name) && !rule.states.includes(stateOf(name)))
    throw refuseNoSuchSetting(name, settable);
  if (between === undefined || inputs[name] !== undefined || !rule.inputs.includes(name)) return options;
  return { ...options, inputs: { ...inputs, [name]: between[0] } };
}
