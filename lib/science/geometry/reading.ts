import { Refusal } from "@/lib/science/refusal";

/** Bytes that can be read in pieces: a file in a browser, an open file on a server, or a buffer in memory. */
export interface ByteSource {
  /** Length in bytes. */
  readonly size: number;
  /** The bytes from `offset`, `length` of them or fewer at the end of the source. */
  read(offset: number, length: number): Promise<Uint8Array> | Uint8Array;
}

/** Something a person should know about a file that could be read all the same. */
export interface MeshWarning {
  readonly code: string;
  readonly message: string;
}

/** What bounds a reading. The caller owns the clock. */
export interface ReadingLimits {
  readonly bytesMax: number;
  readonly trianglesMax: number;
  /** Inflated bytes of a zipped file. */
  readonly inflatedBytesMax: number;
  readonly elapsedMsMax: number;
}

/** House limits: generous for a printed fan, small enough for one worker. */
export const defaultReadingLimits: ReadingLimits = {
  bytesMax: 268_435_456,
  trianglesMax: 4_000_000,
  inflatedBytesMax: 1_073_741_824,
  elapsedMsMax: 120_000,
};

/** How the caller follows and stops a reading. */
export interface ReadingControl {
  readonly limits?: Partial<ReadingLimits>;
  /** Called now and then with the triangles read so far and the number expected (undefined where not known). */
  readonly onProgress?: (trianglesRead: number, trianglesExpected: number | undefined) => void;
  /** True once the person has cancelled. */
  readonly isCancelled?: () => boolean;
  /** Milliseconds since the reading began. Without it no time limit holds. */
  readonly elapsedMs?: () => number;
}

/** Limits, progress and cancelling of one reading, in the form that the readers use. */
export class ReadingWatch {
  readonly limits: ReadingLimits;

  constructor(private readonly control: ReadingControl = {}) {
    this.limits = { ...defaultReadingLimits, ...control.limits };
  }

  /** Reports progress; throws a Refusal when cancelled, too slow or too large. */
  step(trianglesRead: number, trianglesExpected?: number): void {
    if (this.control.isCancelled?.()) throw new Refusal("cancelled", "Reading was cancelled.");
    if (trianglesRead > this.limits.trianglesMax) this.refuseTriangles(trianglesRead);
    const elapsed = this.control.elapsedMs?.();
    if (elapsed !== undefined && elapsed > this.limits.elapsedMsMax) {
      throw new Refusal("time-limit", `Reading took longer than ${this.limits.elapsedMsMax / 1000} s and was stopped.`);
    }
    this.control.onProgress?.(trianglesRead, trianglesExpected);
  }

  /** Throws a Refusal when a file says or shows that it has more triangles than are read. */
  refuseTriangles(triangles: number): never {
    const limit = this.limits.trianglesMax;
    throw new Refusal("too-many-triangles", `The file has ${triangles} triangles or more; at most ${limit} are read.`);
  }
}

/** A source over bytes that are already in memory. */
export function memorySource(bytes: Uint8Array): ByteSource {
  return {
    size: bytes.length,
    read: (offset, length) => bytes.subarray(offset, Math.min(bytes.length, offset + length)),
  };
}
