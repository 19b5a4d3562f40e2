import { type Fit, problemOf } from "../../src/estimate/index.js";

/** A file that was read into the case. */
export interface RecordNote {
  /** As the analyst wrote it. */
  readonly path: string;
  readonly rows: number;
  /** SHA-256 of the file's bytes, hexadecimal. */
  readonly checksum: string;
}

/** The question at the head of a case; see `openCase`. */
export interface CaseHead {
  readonly title: string;
  readonly question: string;
  readonly domain: string;
  readonly seed: number;
}

/** A rule that a comparison ruled out on one record. */
export interface RuledOut {
  readonly fit: Fit;
  /** What the comparison calls it. */
  readonly label: string;
  /** The rules that the comparison supports; none where it found no rule adequate. */
  readonly supported: readonly string[];
}

interface OpenCase {
  readonly head: CaseHead;
  readonly records: Map<string, RecordNote>;
  readonly steps: string[];
  readonly answers: string[];
  ruledOut: readonly RuledOut[];
  readonly forecasts: Fit[];
}

/** Used, and shown, where no case was opened. */
export const defaultSeed = 1;

/** The case of the notebook; a kernel runs one. Without `openCase` there is none, and nothing is kept between calls. */
let opened: OpenCase | undefined;

/** What the functions of one notebook note for its rerun block and its cautions; without an open case, nothing. */
export const caseLog: {
  /** Begins afresh, whatever was noted before. */
  open(head: CaseHead): void;
  seed(): number;
  noteRecord(record: RecordNote): void;
  noteStep(step: string): void;
  noteAnswer(sentence: string): void;
  /** What a comparison of fits ruled out; it replaces what an earlier one said of the same rules on the same record. */
  noteVerdict(compared: readonly Fit[], ruledOut: readonly RuledOut[]): void;
  noteForecast(fit: Fit): void;
  /** What a reader of the answer must know of the rules it rests on. */
  cautions(): readonly string[];
  head(): CaseHead | undefined;
  records(): readonly RecordNote[];
  steps(): readonly string[];
  answers(): readonly string[];
} = {
  open: (head) => {
    opened = { head, records: new Map(), steps: [], answers: [], ruledOut: [], forecasts: [] };
  },
  seed: () => opened?.head.seed ?? defaultSeed,
  noteRecord: (record) => {
    opened?.records.set(record.path, record);
  },
  noteStep: (step) => {
    if (opened?.steps.includes(step) === false) opened.steps.push(step);
  },
  noteAnswer: (sentence) => {
    opened?.answers.push(sentence);
  },
  noteVerdict: (compared, ruledOut) => {
    if (opened === undefined) return;
    const before = opened.ruledOut.filter(({ fit }) => !compared.some((each) => isSameModel(each, fit)));
    opened.ruledOut = [...before, ...ruledOut];
  },
  noteForecast: (fit) => {
    if (opened?.forecasts.includes(fit) === false) opened.forecasts.push(fit);
  },
  cautions: () => (opened === undefined ? [] : cautionsOf(opened)),
  head: () => opened?.head,
  records: () => [...(opened?.records.values() ?? [])],
  steps: () => opened?.steps ?? [],
  answers: () => opened?.answers ?? [],
};

/** A record whose forecasts all rest on rules that a comparison on it ruled out; one that stands is enough for it. */
function cautionsOf({ forecasts, ruledOut }: OpenCase): readonly string[] {
  const records = new Set(forecasts.map(recordOf));
  return [...records].flatMap((record) => {
    const used = forecasts.filter((fit) => recordOf(fit) === record);
    const found = used.map((fit) => ruledOut.find((each) => isSameModel(each.fit, fit)));
    return found.includes(undefined) ? [] : [...new Set(found.map((each) => cautionOf(each!)))];
  });
}

function cautionOf({ label, supported }: RuledOut): string {
  const instead =
    supported.length === 0
      ? "found no rule adequate"
      : `supports ${supported.map((each) => `"${each}"`).join(" and ")} instead`;
  return `The answer rests on "${label}", but the comparison on the same record ${instead}.`;
}

/** The periods of a record are the same list in every fit to it, also where its state goes by the rule's name. */
const recordOf = ({ observations }: Fit): object => observations.groups[0]!.time;

/** The same rule with the same kind of errors on the same record, though it may have been fitted twice. */
function isSameModel(one: Fit, other: Fit): boolean {
  const [a, b] = [problemOf(one), problemOf(other)];
  return (
    recordOf(one) === recordOf(other) &&
    one.rule.text === other.rule.text &&
    a.errors === b.errors &&
    a.distribution === b.distribution &&
    a.groups === b.groups
  );
}
