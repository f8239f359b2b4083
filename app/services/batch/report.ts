/** A batch as it is kept: what arrived, what the table says of it, what was found, what became of it. */

export interface BatchReport {
  phase: (typeof BATCH_PHASES)[number];
  files: BatchFile[];
  /** Null while there is no table. */
  table: { name: string; problem: string | null; remarks: string[] } | null;
  rows: BatchRow[];
  /** Files of the system that nobody means to send, passed over. */
  passedOver: number;
  /** Whoever works on it now, and until when nobody else does. */
  worker: { id: string; until: string } | null;
}

export interface BatchFile {
  /** With its folders: "wet night/first.csv". */
  path: string;
  sizeBytes: number;
  /** Null where it was refused and nothing of it was kept. */
  kept: { key: string; sha256: string } | null;
  refused: string | null;
  /** Null until it was read. */
  check: FileCheck | null;
}

export type FileCheck = {
  /** The bench it was read with, as the row has it: another bench asks for another reading. */
  bench: string;
} & (
  | { kind: "read"; points: number; startHz: number; stopHz: number; dips: number }
  /** Nothing stands in the way: it is kept unread, and a person looks at it, as with every picture that is not certain. */
  | { kind: "to-read"; words: string }
  | { kind: "unreadable"; words: string; line: number | null; column: number | null; keepable: boolean }
  | { kind: "here"; sweep: string; title: string }
);

/** What is said of a sweep, as it was written. */
export interface Wanted {
  title: string;
  takenAt: string;
  bench: string;
  step: string;
}

export interface BatchRow {
  /** Its place in `files`; null where the table names a file that is not there. */
  file: number | null;
  /** As the table writes it; the path where no table does. */
  name: string;
  /** Line of the table; null where no table says anything of the file. */
  line: number | null;
  wanted: Wanted;
  leftOut: boolean;
  /** Taken in although it can't be read yet. */
  keepUnread: boolean;
  result: RowResult | null;
}

export interface RowResult {
  kind: "read" | "unread" | "twice" | "refused" | "failed";
  title: string;
  /** Public id; null where nothing was stored. */
  sweep: string | null;
  words: string;
}

export const BATCH_PHASES = ["receiving", "checking", "checked", "taking", "done"] as const;

export const EMPTY_REPORT: BatchReport = {
  phase: "receiving",
  files: [],
  table: null,
  rows: [],
  passedOver: 0,
  worker: null,
};

/** A folder of a long season: 300 sweeps are about twice the largest seen in one project. */
export const MOST_FILES = 300;
/** All files of a batch as they are kept. */
export const MOST_BYTES = 512 * 1024 * 1024;
