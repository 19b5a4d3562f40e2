import { type Fit, problemOf } from "../../estimate/index.js";
import type { Rule } from "../../rule/index.js";
import { multipleError, noRangeError, rangeError, unknownSettingError } from "../errors.js";
import { type DecisionOptions, isFit, stateOf } from "./decision-context.js";

/**
 * Options under which a name can be set, refused where nothing has that name. An input that is to be set needs no plan of
 * its own: it begins at the lower end of its range.
 *
 * @throws {ModelError} `no-such-setting` | `no-range`.
 */
export function withUnplanned<T extends DecisionOptions>(
  subject: Fit | Rule,
  options: T,
  name: string,
  between: readonly [number, number] | undefined,
): T {
  const { inputs = {} } = options;
  const rule = isFit(subject) ? subject.rule : subject;
  const settable = [...rule.parameters, ...rule.states.map((state) => `${state}[0]`), ...rule.inputs];
  if (!settable.includes(name) && !rule.states.includes(stateOf(name)))
    throw unknownSettingError(name, settable);
  if (inputs[name] !== undefined || !rule.inputs.includes(name)) return options;
  if (between === undefined) throw noRangeError(name);
  return { ...options, inputs: { ...inputs, [name]: between[0] } };
}

/**
 * The range that was given, where one was.
 *
 * @throws {ModelError} `range-contradicts` | `multiple-not-positive`.
 */
export function checkedRange(
  subject: Fit | Rule,
  { range, vary, multiple }: RangeOptions,
): readonly [number, number] | undefined {
  if (multiple !== undefined && !(multiple > 0 && Number.isFinite(multiple))) throw multipleError(multiple);
  if (range === undefined) return undefined;
  const why = contradiction(subject, vary, range, multiple);
  if (why !== undefined) throw rangeError(vary, range[0], range[1], why);
  return range;
}

interface RangeOptions {
  readonly range?: readonly [number, number];
  readonly vary: string;
  readonly multiple?: number;
}

function contradiction(
  subject: Fit | Rule,
  vary: string,
  [from, to]: readonly [number, number],
  multiple: number | undefined,
): string | undefined {
  const own = isFit(subject) ? subject.rule : subject;
  const [low, high] = isFit(subject) ? problemOf(subject).bounds(vary) : (own.bounds[vary] ?? [from, to]);
  if (!(from < to)) return "the first must be the smaller one";
  if (to < low || from > high) return `the rule bounds ${vary} to ${low} to ${high}`;
  const none = multiple !== undefined && Math.floor(to / multiple) < Math.ceil(from / multiple);
  return none ? `no multiple of ${multiple} lies in it` : undefined;
}
