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

interface CaseLog {
  head: CaseHead | undefined;
  readonly records: Map<string, RecordNote>;
  readonly steps: string[];
  readonly answers: string[];
  /** Rule text -> the rule that a comparison of the case supports instead. */
  readonly rejected: Map<string, string>;
  readonly forecasts: Set<string>;
}

/** Used, and shown, where no case was opened. */
export const defaultSeed = 1;

const log: CaseLog = {
  head: undefined,
  records: new Map(),
  steps: [],
  answers: [],
  rejected: new Map(),
  forecasts: new Set(),
};

/** What the commands of one notebook note for its rerun block. One case at a time: a kernel runs one notebook. */
export const caseLog: {
  open(head: CaseHead): void;
  seed(): number;
  noteRecord(record: RecordNote): void;
  noteStep(step: string): void;
  noteAnswer(sentence: string): void;
  /** The rules a comparison supports, and those it puts behind them. */
  noteVerdict(supported: readonly string[], rejected: readonly string[]): void;
  noteForecast(rule: string): void;
  /** What a reader of the answer must know of the rules it rests on. */
  cautions(): readonly string[];
  head(): CaseHead | undefined;
  records(): readonly RecordNote[];
  steps(): readonly string[];
  answers(): readonly string[];
} = {
  open: (head) => {
    log.head = head;
    log.steps.length = 0;
    log.answers.length = 0;
    log.rejected.clear();
    log.forecasts.clear();
  },
  seed: () => log.head?.seed ?? defaultSeed,
  noteRecord: (record) => {
    log.records.set(record.path, record);
  },
  noteStep: (step) => {
    if (!log.steps.includes(step)) log.steps.push(step);
  },
  noteAnswer: (sentence) => {
    log.answers.push(sentence);
  },
  noteVerdict: (supported, rejected) => {
    for (const rule of supported) log.rejected.delete(rule);
    for (const rule of rejected) log.rejected.set(rule, supported[0] ?? "");
  },
  noteForecast: (rule) => {
    log.forecasts.add(rule);
  },
  cautions: () => {
    const used = [...log.forecasts];
    if (used.some((rule) => !log.rejected.has(rule))) return [];
    return used.map(
      (rule) =>
        `The answer rests on "${rule}", which the comparison in this case puts behind "${log.rejected.get(rule)}".`,
    );
  },
  head: () => log.head,
  records: () => [...log.records.values()],
  steps: () => log.steps,
  answers: () => log.answers,
};
