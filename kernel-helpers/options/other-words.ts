import { nearestNames } from "../../src/numeric/index.js";

/**
 * Words that analysts type for an option, by the option's name: words of statistics, of other programs in general, and
 * those that were an option's name before.
 */
const otherNames: Readonly<Record<string, string>> = {
  errors: "error blame errorIn errorKind errorType",
  distribution: "spread dist family errorModel errorDistribution kind likelihood type proportional",
  sd: "sigma stdev std stddev standardDeviation deviation scale cv spread",
  size: "dispersion k theta overdispersion",
  level: "alpha confidence confidenceLevel conf ci significance coverage probability",
  levels: "level bands alpha confidence ci quantiles coverage",
  periods: "horizon steps n h ahead length duration end until periodsAhead",
  paths:
    "draws lots runs simulations sims samples nsim trials trajectories replications iterations n resamples",
  resamples:
    "draws refits lots replications iterations reps nboot bootstraps samples nsim B n paths simulations",
  parameters: "constants constant params parameter unknowns coefficients theta values",
  fixed: "constants constant held hold known parameters",
  vary: "setting unknown unknowns constant constants parameter param variable over",
  range: "between within bounds limits interval domain from to",
  values: "when columns points grid times settings candidates range",
  initial: "starts start init initials x0 y0 initialState initialValue initialValues first startingValues",
  start: "starts guess guesses initialGuess init x0 startingValues initial",
  bounds: "limits range between lower upper constraints",
  factor: "q catchability scale proportional",
  robust: "huber",
  groups: "group by pool pooling pooled",
  group: "groups series by",
  cut: "cutoff criterion",
  intervals: "interval profile profiles ci",
  maximize: "most max maximum maximise best largest objective",
  minimize: "least min minimum minimise smallest objective",
  risesTo: "value direction target threshold to above reaches level",
  fallsTo: "value direction target threshold to below reaches level",
  probability: "risk chance prob",
  time: "when reaches",
  until: "target goal aim",
  answer: "measure output of reading",
  answers: "answer measures outputs",
  is: "equals value target",
  atMost: "max maximum below",
  atLeast: "min minimum above",
  multiple: "step rounding round",
  replicates: "repeats readings count",
  cost: "price weight",
  state: "variable column of series",
  newUnit: "newGroup population",
  noise: "error errors random processNoise processError stochastic randomness",
  observationNoise: "observationError readingError measurementNoise measurementError readingNoise",
  centre: "center mean",
  seed: "random randomSeed rng randomState",
  onProgress: "progress callback onStep onUpdate",
  signal: "abort abortSignal controller cancel stop",
  inputs: "input plan plans exogenous covariates drivers forcing",
  scenarios: "scenario plans cases",
  watch: "watches follow",
  usual: "value base normal default level",
  startsAt: "start first offset origin begin",
  period: "time date index timeColumn dateColumn periods cycle",
  step: "every frequency freq interval spacing steps",
  every: "count n number",
  value: "column y observed response data",
  unit: "units",
  units: "unit",
  by: "group groups groupBy id series",
  where: "filter rows",
  weight: "weights",
  censored: "censoring limits detectionLimit",
  measured: "type kind",
  duplicates: "duplicate ties",
  disorder: "sort sorted unsorted",
  offStep: "irregular tolerance",
  identities: "identity balance checks",
  origins: "origin folds splits windows",
  decide: "decision",
  leastShare: "trim trimming minShare margin",
  block: "blockLength blockSize length",
  discard: "burnin burn warmup transient skip",
  count: "n number starts points grid size",
  searches: "starts restarts tries",
  limit: "max most maximum",
  known: "prior initial",
  error: "uncertainty sd precision",
  tolerance: "threshold limit",
  digits: "precision decimals",
  order: "differences times",
  lag: "delay leadTime lead distance",
  per: "kind type scale",
  seasonal: "season seasonality period frequency",
  format: "type fileType",
  delimiter: "separator sep",
  decimal: "decimalSign dec",
  dates: "dateFormat dateOrder",
  missing: "na naValues nullValues",
  skip: "skipRows skipLines",
  header: "headers columnNames",
  table: "sheet sheetName worksheet tableName",
  column: "columns variable of value",
  over: "window width size length periods",
  take: "summary aggregate agg fun function statistic how",
  needed: "minPeriods minimum least",
  with: "method rule using value how",
  to: "step into target frequency",
  keep: "index id rows",
  names: "columns pivot key variable",
  steps: "lag periods by shift",
  name: "as label newName",
  why: "reason because comment note",
  who: "author by user",
  now: "value to new corrected",
  row: "line index rows",
  title: "name heading",
  question: "ask",
  domain: "field area",
  date: "day",
  columns: "fields headings",
  rows: "data values",
  notes: "footnotes note remarks",
  layers: "layer marks traces data",
  panels: "panel subplots facets",
  residuals: "residual fun function objective",
  jacobian: "jac gradient derivatives",
  lower: "min minimum bounds",
  upper: "max maximum bounds",
  life: "shelfLife shelf age ages",
  issue: "issuing policy order",
  ages: "classes count n age",
  stages: "classes names states",
  moves: "transitions",
  recruits: "recruitment shape",
  minorDigits: "decimals digits places",
};

/** Words for a choice's values. */
const otherValues: Readonly<Record<string, string>> = {
  normal: "gaussian norm constant additive gauss",
  lognormal: "proportional multiplicative log logNormal",
  poisson: "count counts",
  "negative-binomial": "negbin nbinom nb",
  observation: "measurement reading trajectory output observations",
  process: "step oneStep state system dynamics change",
  both: "stateSpace kalman",
  combined: "pooled pool together all",
  separate: "single each none",
  mixed: "random hierarchical multilevel",
  parametric: "normal simulated",
  residuals: "residual nonparametric",
  mean: "average avg",
  deviation: "sd std stdev",
  middle: "median",
  least: "min minimum lowest",
  most: "max maximum highest",
  previous: "ffill forward last pad",
  between: "linear interpolate",
  debts: "debt loan loans",
  cultures: "culture microbiology growth",
  stock: "inventory shelf",
  harvest: "fishery fishing catch",
  excel: "xlsx xls",
  "month-end": "endOfMonth eom monthend",
  "iso-week": "isoweek",
};

/** Case, hyphens and underscores apart, two words are the same. */
const plain = (word: string): string => word.toLowerCase().replace(/[-_\s]/g, "");

const listed = (words: string | undefined): readonly string[] => (words ?? "").split(" ").map(plain);

/** The names among those known that someone who typed another may have meant, likeliest first. */
export function meant(name: string, known: readonly string[]): readonly string[] {
  return likeliest(name, known, otherNames);
}

/** The value among those of a choice that someone who typed another may have meant. */
export function nearestChoice(value: string, known: readonly string[]): string | undefined {
  return likeliest(value, known, otherValues)[0];
}

function likeliest(
  word: string,
  known: readonly string[],
  others: Readonly<Record<string, string>>,
): readonly string[] {
  const typed = plain(word);
  const same = known.filter((each) => plain(each) === typed);
  if (same.length > 0) return same;
  const byWord = known.filter((each) => listed(others[each]).includes(typed));
  const near = nearestNames(word, known);
  if (byWord.length > 0) return byWord.slice(0, 3);
  if (near.length > 0) return near;
  const all = known.flatMap((each) => listed(others[each]).map((other) => ({ each, other })));
  const [likeWord] = nearestNames(
    typed,
    all.map(({ other }) => other).filter((other) => other.length > 3),
  );
  if (likeWord !== undefined) return all.filter(({ other }) => other === likeWord).map(({ each }) => each);
  return known.filter((each) => each.length > 3 && typed.includes(plain(each)));
}
