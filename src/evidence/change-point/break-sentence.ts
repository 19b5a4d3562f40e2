import type { Fit } from "../../estimate/index.js";
import type { GroupChangePoint } from "./group-change-point.js";

/** What a search for a break comes to, as a client would be told. */
export function breakSentence(found: Omit<GroupChangePoint, "sentence">, fit: Fit, level: number): string {
  const who = found.group === "" ? "" : `${found.group}: `;
  const chance = `${Math.max(1, Math.round(100 * found.probability))}%`;
  const { axis } = fit.observations;
  const { date, earliest, latest } = found.labels;
  const on = axis.counts === "numbers" ? `${axis.column} ${date}` : date;
  if (!found.found)
    return (
      `${who}No break is found: the largest difference, at ${on}, would come up by chance in ` +
      `${chance} of records without one.`
    );
  const shown = (value: number): string => Number(value.toPrecision(3)).toString();
  const moved = Object.keys(found.before.parameters)
    .filter((name) => found.before.parameters[name] !== found.after.parameters[name])
    .map(
      (name) =>
        `${name} from ${shown(found.before.parameters[name]!)} to ${shown(found.after.parameters[name]!)}`,
    );
  const less = found.probability < 0.01 ? "less than 1%" : chance;
  return (
    `${who}The rule changed from ${on} on (${Math.round(100 * level)}% interval ` +
    `${earliest} to ${latest}): ${moved.join(", ")}. By chance a difference as large comes up ` +
    `in ${less} of records without a break. Project with the parameters after it only.`
  );
}
