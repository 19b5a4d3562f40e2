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
}

/** Used, and shown, where no case was opened. */
export const defaultSeed = 1;

const log: CaseLog = { head: undefined, records: new Map(), steps: [], answers: [] };

/** What the commands of one notebook note for its rerun block. One case at a time: a kernel runs one notebook. */
export const caseLog: {
  open(head: CaseHead): void;
  seed(): number;
  noteRecord(record: RecordNote): void;
  noteStep(step: string): void;
  noteAnswer(sentence: string): void;
  head(): CaseHead | undefined;
  records(): readonly RecordNote[];
  steps(): readonly string[];
  answers(): readonly string[];
} = {
  open: (head) => {
    log.head = head;
    log.steps.length = 0;
    log.answers.length = 0;
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
  head: () => log.head,
  records: () => [...log.records.values()],
  steps: () => log.steps,
  answers: () => log.answers,
};
