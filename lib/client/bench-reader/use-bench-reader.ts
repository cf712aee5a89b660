"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import type { BenchAnswer, BenchRequest } from "./messages";

export type Found<K extends BenchRequest["kind"]> = Extract<BenchAnswer, { kind: K }>;
type Refused = Extract<BenchAnswer, { kind: "refused" }>;

export type ReaderState<K extends BenchRequest["kind"]> =
  | { step: "none" }
  | { step: "reading"; done: number; of: number }
  | { step: "found"; found: Found<K> }
  | { step: "refused"; refused: Refused };

export interface BenchReader<K extends BenchRequest["kind"]> {
  state: ReaderState<K>;
  /** Reads a file; what still runs for another one is stopped, not waited for. */
  read(file: File, order: Extract<BenchRequest, { kind: K }>["order"]): void;
  /** Stops the reading and forgets what was found. */
  clear(): void;
}

const makeWorker = (): Worker => new Worker(new URL("../workers/bench-reader.worker.ts", import.meta.url));

/** Reads files of the bench in a web worker, which is started with the first of them. */
export function useBenchReader<K extends BenchRequest["kind"]>(kind: K): BenchReader<K> {
  const [state, setState] = useState<ReaderState<K>>({ step: "none" });
  const worker = useRef<Worker | undefined>(undefined);
  const job = useRef(0);

  const stop = useCallback(() => {
    job.current += 1;
    worker.current?.terminate();
    worker.current = undefined;
  }, []);
  useEffect(() => stop, [stop]);

  const hear = useCallback(
    (said: BenchAnswer) => {
      if (said.job !== job.current) return;
      if (said.kind === "progress") setState({ step: "reading", done: said.done, of: said.of });
      else if (said.kind === "refused") setState({ step: "refused", refused: said });
      else if (said.kind === kind) setState({ step: "found", found: said as Found<K> });
    },
    [kind],
  );

  return {
    state,
    read(file, order) {
      stop();
      const made = makeWorker();
      worker.current = made;
      const mine = job.current;
      made.addEventListener("message", ({ data }: MessageEvent<BenchAnswer>) => hear(data));
      made.addEventListener("error", (event) => {
        const message = event.message || "The reader didn’t start.";
        hear({ kind: "refused", job: mine, code: "failed", message, at: null });
      });
      setState({ step: "reading", done: 0, of: file.size });
      made.postMessage({ kind, job: mine, file, order });
    },
    clear() {
      stop();
      setState({ step: "none" });
    },
  };
}
