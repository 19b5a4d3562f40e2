import { type Rule, rules } from "../../rule/index.js";
import { catchSymbol } from "./catch-input.js";

/** A catalogue rule that one recorded state may identify. */
export interface Candidate {
  readonly name: string;
  readonly rule: Rule;
  /** False where the rule speaks of positive levels only. */
  readonly anyLevel: boolean;
  /** Shape parameters beyond these values cannot be told from a limit that is a rule of its own. */
  readonly bounds: Readonly<Record<string, readonly [number, number]>>;
}

/** A catalogue rule that was left out, and why. */
export interface NotTried {
  /** In the catalogue: `rules[name]`. */
  readonly name: string;
  readonly reason: string;
}

const shape: readonly [number, number] = [0.05, 20];

/**
 * Catalogue rules for a record of one state, simplest first, and those left out with the reason.
 *
 * @param inputs - names of the recorded inputs; the harvest rules need the catch as "C".
 */
export function candidatesFor(inputs: readonly string[]): {
  readonly candidates: readonly Candidate[];
  readonly left: readonly NotTried[];
} {
  const candidate = (name: string, rule: Rule, more: Partial<Candidate> = {}): Candidate => ({
    name,
    rule,
    anyLevel: false,
    bounds: {},
    ...more,
  });
  const caught = inputs.includes(catchSymbol);
  const candidates = [
    candidate("constantChange", rules.constantChange(), { anyLevel: true }),
    candidate("geometric", rules.geometric(), { anyLevel: true }),
    candidate("affine", rules.affine(), { anyLevel: true }),
    candidate("logistic", rules.logistic()),
    candidate("bevertonHolt", rules.bevertonHolt()),
    candidate("ricker", rules.ricker()),
    candidate("gompertz", rules.gompertz()),
    candidate("delayedDensity", rules.delayedDensity({ lag: 1 })),
    candidate("hassell", rules.hassell(), { bounds: { b: shape } }),
    candidate("maynardSmithSlatkin", rules.maynardSmithSlatkin(), { bounds: { b: shape } }),
    candidate("thetaLogistic", rules.thetaLogistic(), { bounds: { theta: shape } }),
    candidate("allee", rules.allee()),
    ...(caught ? harvested().map(([name, rule]) => candidate(name, rule)) : []),
  ];
  return { candidates, left: leftOut(caught) };
}

function harvested(): readonly (readonly [string, Rule])[] {
  return [
    ["schaefer", rules.schaefer({ inputs: [catchSymbol] })],
    ["fox", rules.fox({ inputs: [catchSymbol] })],
  ];
}

function leftOut(caught: boolean): readonly NotTried[] {
  const because = (reason: string, ...names: string[]): NotTried[] => names.map((name) => ({ name, reason }));
  return [
    ...because("is the affine rule with other names", "dosing"),
    ...because("is Beverton-Holt with parameters that one record cannot tell apart", "chemostat", "transfer"),
    ...because("has a state that is not recorded", "baranyi", "resource"),
    ...because("works on logarithms and needs the length of a step in hours", "threePhase"),
    ...because("needs two recorded states", "nicholsonBailey", "clumpedParasitoid", "competition"),
    ...because("needs a recorded class at every age or stage", "ages", "stages", "perishable"),
    ...because(
      "needs its input recorded",
      "driven",
      "smoothing",
      "levelAndTrend",
      "sporadicDemand",
      "inventory",
    ),
    ...because("needs a stated target or delay", "gapCorrection", "adultsAndRecruits"),
    ...because("has a shape parameter that the catch alone rarely identifies", "pellaTomlinson"),
    ...(caught ? [] : because('needs the catch recorded as the input "C"', "schaefer", "fox")),
  ];
}
