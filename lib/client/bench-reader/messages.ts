import type { RecordingOrder, RecordingResult } from "@/lib/domain/bench/read-recording";
import type { FoundLog, LogOrder } from "@/lib/domain/bench/read-log";

export type { FoundLog, LogOrder, RecordingOrder, RecordingResult };

/** What the bench's reader is asked: one file at a time; `job` tells the answers of one from those of another. */
export type BenchRequest =
  | { readonly kind: "recording"; readonly job: number; readonly file: Blob; readonly order: RecordingOrder }
  | { readonly kind: "log"; readonly job: number; readonly file: Blob; readonly order: LogOrder };

export type BenchAnswer =
  /** Bytes gone through, of those that will be: a recording is gone through more than once. */
  | { readonly kind: "progress"; readonly job: number; readonly done: number; readonly of: number }
  | { readonly kind: "recording"; readonly job: number; readonly result: RecordingResult }
  | { readonly kind: "log"; readonly job: number; readonly found: FoundLog }
  | {
      readonly kind: "refused";
      readonly job: number;
      readonly code: string;
      readonly message: string;
      /** Where in the file: a byte, a line, a column's role. */
      readonly at: string | null;
    };
