import type { Rule } from "../rule.js";
import type { NamedRuleOptions } from "./catalogue-rule.js";
import * as culture from "./culture-rules.js";
import * as crowding from "./density-dependence-rules.js";
import * as harvest from "./harvest-rules.js";
import type { LagOption } from "./lag.js";
import * as linear from "./linear-rules.js";
import type { RecruitOption } from "./population-rules.js";
import * as population from "./population-rules.js";
import type { AgesOption, PerishableOption, StageOption } from "./stage-rules.js";
import * as stage from "./stage-rules.js";
import * as stock from "./stock-rules.js";

type PlainRule = (options?: NamedRuleOptions) => Rule;
type DelayedRule = (options: NamedRuleOptions & LagOption) => Rule;

/** One function per catalogue rule. */
export interface RuleCatalogue {
  readonly constantChange: PlainRule;
  readonly geometric: PlainRule;
  readonly affine: PlainRule;
  readonly dosing: PlainRule;
  readonly driven: PlainRule;
  readonly logistic: PlainRule;
  readonly bevertonHolt: PlainRule;
  readonly ricker: PlainRule;
  readonly hassell: PlainRule;
  readonly maynardSmithSlatkin: PlainRule;
  readonly thetaLogistic: PlainRule;
  readonly gompertz: PlainRule;
  readonly allee: PlainRule;
  readonly pellaTomlinson: PlainRule;
  readonly schaefer: PlainRule;
  readonly fox: PlainRule;
  readonly threePhase: PlainRule;
  readonly baranyi: PlainRule;
  readonly resource: PlainRule;
  readonly chemostat: PlainRule;
  readonly transfer: PlainRule;
  readonly smoothing: PlainRule;
  readonly levelAndTrend: PlainRule;
  readonly sporadicDemand: PlainRule;
  readonly inventory: DelayedRule;
  readonly gapCorrection: DelayedRule;
  readonly perishable: (options: NamedRuleOptions & PerishableOption) => Rule;
  readonly delayedDensity: DelayedRule;
  readonly nicholsonBailey: PlainRule;
  readonly clumpedParasitoid: PlainRule;
  readonly competition: PlainRule;
  readonly adultsAndRecruits: (options: NamedRuleOptions & RecruitOption) => Rule;
  readonly ages: (options: NamedRuleOptions & AgesOption) => Rule;
  readonly stages: (options: NamedRuleOptions & StageOption) => Rule;
}

/**
 * The catalogue of named rules, ready to be run, fitted and compared. Each function returns its rule; options are
 * those of `recurrence`, and for some a lag, a number of age classes or a shelf life, in periods.
 *
 * @example rules.bevertonHolt().text; // "N[t+1] = R*N/(1 + (R - 1)*N/K)"
 */
export const rules: RuleCatalogue = Object.freeze({
  constantChange: linear.constantChangeRule,
  geometric: linear.geometricRule,
  affine: linear.affineRule,
  dosing: linear.dosingRule,
  driven: linear.drivenRule,
  logistic: crowding.logisticRule,
  bevertonHolt: crowding.bevertonHoltRule,
  ricker: crowding.rickerRule,
  hassell: crowding.hassellRule,
  maynardSmithSlatkin: crowding.maynardSmithSlatkinRule,
  thetaLogistic: crowding.thetaLogisticRule,
  gompertz: crowding.gompertzRule,
  allee: crowding.alleeRule,
  pellaTomlinson: harvest.pellaTomlinsonRule,
  schaefer: harvest.schaeferRule,
  fox: harvest.foxRule,
  threePhase: culture.threePhaseRule,
  baranyi: culture.baranyiRule,
  resource: culture.resourceRule,
  chemostat: culture.chemostatRule,
  transfer: culture.transferRule,
  smoothing: stock.smoothingRule,
  levelAndTrend: stock.levelAndTrendRule,
  sporadicDemand: stock.sporadicDemandRule,
  inventory: stock.inventoryRule,
  gapCorrection: stock.gapCorrectionRule,
  perishable: stage.perishableRule,
  delayedDensity: population.delayedDensityRule,
  nicholsonBailey: population.nicholsonBaileyRule,
  clumpedParasitoid: population.clumpedParasitoidRule,
  competition: population.competitionRule,
  adultsAndRecruits: population.adultsAndRecruitsRule,
  ages: stage.agesRule,
  stages: stage.stagesRule,
});
