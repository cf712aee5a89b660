"use client";

import type { FanDrawing } from "@/lib/science/geometry/drawing/drawn-view";
import { useCallback, useEffect, useRef, useState } from "react";
import type { Comparison, Surroundings } from "./compare-model";
import { makeMeshWorker, type Turnable } from "./turnable";
import type { ModelFile, ModelMeasured, WorkerAnswer, WorkerRequest } from "./messages";

/** Where the reading of a model stands. */
export type ModelState =
  | { readonly step: "none" }
  | { readonly step: "reading"; readonly name: string; readonly read: number; readonly expected: number | undefined }
  /** Read, and its unit is for a person to say. */
  | { readonly step: "unit"; readonly model: ModelFile }
  | { readonly step: "measuring"; readonly model: ModelFile; readonly mmPerUnit: number }
  | {
      readonly step: "measured";
      readonly model: ModelFile;
      readonly mmPerUnit: number;
      readonly measured: ModelMeasured;
      /** Follows a little later. */
      readonly drawn: { readonly drawing: FanDrawing; readonly svg: string } | undefined;
      /** The latest answer to `compare`; undefined before it. */
      readonly compared: { readonly comparison: Comparison | undefined } | undefined;
    }
  | { readonly step: "refused"; readonly name: string; readonly code: string; readonly message: string };

export interface ModelReadingActs {
  readonly state: ModelState;
  /** The reader is loaded: from now on only solids of a chosen season are fetched. A file chosen earlier waits for it. */
  readonly ready: boolean;
  /**
   * Reads a file and, where its unit is beyond doubt, measures it; with a unit given, mm, nothing is asked. Another
   * file takes the place of the first.
   */
  choose(file: File, mmPerUnit?: number): void;
  /** Measures the model in a unit, mm per file unit. */
  measureIn(mmPerUnit: number): void;
  cancel(): void;
  /** Compares the measured model; the answer comes as the state's `compared`. The latest question counts. */
  compare(around: Surroundings): void;
  /** The measured model, ready to be turned in 3D. */
  turn(): Promise<Turnable>;
}

/** Reads model files in a web worker of this page. It is started with the page, so that later nothing is fetched. */
export function useModelReading(): ModelReadingActs {
  const [state, setState] = useState<ModelState>({ step: "none" });
  const [ready, setReady] = useState(false);
  const worker = useRef<Worker | undefined>(undefined);
  const job = useRef(0);
  const ask = useRef(0);
  const turned = useRef<((model: Turnable) => void) | undefined>(undefined);
  const unit = useRef<number | undefined>(undefined);
  const now = useRef(state);
  const go = useCallback((next: ModelState) => {
    now.current = next;
    setState(next);
  }, []);
  const send = useCallback((request: WorkerRequest) => worker.current?.postMessage(request), []);

  const measureIn = useCallback(
    (mmPerUnit: number) => {
      const at = now.current;
      if (!("model" in at)) return;
      go({ step: "measuring", model: at.model, mmPerUnit });
      send({ kind: "measure", job: job.current, mmPerUnit });
    },
    [go, send],
  );

  const hear = useCallback(
    (message: WorkerAnswer) => {
      const at = now.current;
      if (message.kind === "ready") {
        setReady(true);
        return;
      }
      if (message.job !== job.current) return;
      if (message.kind === "progress" && at.step === "reading") {
        go({ ...at, read: message.read, expected: message.expected });
      }
      if (message.kind === "read") {
        const { model } = message;
        go({ step: "unit", model });
        // A unit that the file names counts; without one, millimetres that look like a fan's are taken.
        if (unit.current !== undefined) measureIn(unit.current);
        else if (model.guess === "mm") measureIn(model.mmPerUnit ?? 1);
      }
      if (message.kind === "measured" && at.step === "measuring") {
        go({
          step: "measured",
          model: at.model,
          mmPerUnit: at.mmPerUnit,
          measured: message.measured,
          drawn: undefined,
          compared: undefined,
        });
      }
      if (message.kind === "drawn" && at.step === "measured") {
        go({ ...at, drawn: { drawing: message.drawing, svg: message.svg } });
      }
      if (message.kind === "compared" && at.step === "measured" && message.ask === ask.current) {
        go({ ...at, compared: { comparison: message.comparison } });
      }
      if (message.kind === "turnable") turned.current?.(message.model);
      if (message.kind === "refused") {
        const name = "model" in at ? at.model.name : "name" in at ? at.name : "";
        go({ step: "refused", name, code: message.code, message: message.message });
      }
    },
    [go, measureIn],
  );

  const start = useCallback(() => {
    worker.current?.terminate();
    worker.current = makeMeshWorker();
    worker.current.addEventListener("message", ({ data }: MessageEvent<WorkerAnswer>) => hear(data));
    worker.current.addEventListener("error", (event) => {
      hear({ kind: "refused", job: job.current, code: "failed", message: event.message || "The reader didn’t start." });
    });
  }, [hear]);

  useEffect(() => {
    start();
    return () => worker.current?.terminate();
  }, [start]);

  const choose = useCallback(
    (file: File, mmPerUnit?: number) => {
      unit.current = mmPerUnit;
      // What still runs for another file is stopped, not waited for.
      if (["reading", "measuring"].includes(now.current.step)) start();
      job.current += 1;
      go({ step: "reading", name: file.name, read: 0, expected: undefined });
      send({ kind: "read", job: job.current, file });
    },
    [go, send, start],
  );

  const cancel = useCallback(() => {
    job.current += 1;
    start();
    go({ step: "none" });
  }, [go, start]);

  const compare = useCallback(
    (around: Surroundings) => {
      ask.current += 1;
      send({ kind: "compare", job: job.current, ask: ask.current, around });
    },
    [send],
  );

  const turn = useCallback(
    () =>
      new Promise<Turnable>((resolve) => {
        turned.current = resolve;
        send({ kind: "turn", job: job.current });
      }),
    [send],
  );

  return { state, ready, choose, measureIn, cancel, compare, turn };
}
