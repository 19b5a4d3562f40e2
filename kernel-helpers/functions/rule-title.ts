/** Longest rule that stands in a title. */
const longest = 60;

/** " of N[t+1] = R*N": a rule behind a title, where it is short enough to be read there. */
export function ruleTitle(text: string, joint: string): string {
  const lines = text
    .split("\n")
    .map((line) => line.replace(/#.*/, "").trim())
    .filter((line) => line !== "");
  const whole = lines.join("; ");
  return whole.length <= longest ? ` ${joint} ${whole}` : "";
}
