"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useCallback, useEffect, useRef, useState } from "react";
import type * as tus from "tus-js-client";
import type { z } from "zod";
import {
  askedRecording,
  benchRecordings,
  keptRecording,
  type BenchRecordings,
  type newRecording,
} from "@/lib/contracts/bench-recordings";
import { begunUpload, uploadAnswer, type UploadAnswer } from "@/lib/contracts/uploads";
import { ApiError, getJson, send, sendJson } from "./fetcher";
import { benchKeys } from "./query-keys";
import { piecewise, type Sending } from "./uploads";

const api = "/api/v1/bench";
const pollMs = 1_000;
const keyOf = (sessionId: string) => benchKeys.one(sessionId, "recordings");

/** Recordings of a session; asked again and again while the server reads one. */
export function useRecordings(sessionId: string) {
  return useQuery<BenchRecordings, ApiError>({
    queryKey: keyOf(sessionId),
    queryFn: ({ signal }) => getJson(benchRecordings, `${api}/sessions/${sessionId}/recordings`, signal),
    refetchInterval: ({ state }) =>
      state.data?.items.some((each) => each.state === "waiting" || each.state === "reading") ? pollMs : false,
  });
}

type Distributed<T> = T extends unknown ? Omit<T, "uploadId"> : never;
/** What a recording is to be read as, before it has been sent. */
export type RecordingToSend = Distributed<z.input<typeof newRecording>>;

export interface RecordingSender {
  /** Bytes that are on their way; undefined while none are. */
  sending: Sending | undefined;
  /** All bytes are there; the server looks at them. */
  waiting: boolean;
  error: ApiError | null;
  send(file: File, order: RecordingToSend, then: () => void): void;
  cancel(): void;
}

/** Sends a recording in pieces by tus and asks for it to be read once it is all there. */
export function useSendRecording(sessionId: string): RecordingSender {
  const client = useQueryClient();
  const [sending, setSending] = useState<Sending>();
  const stopping = useRef<AbortController | undefined>(undefined);
  useEffect(() => () => stopping.current?.abort(), []);
  const sent = useMutation<void, ApiError, { file: File; order: RecordingToSend }>({
    mutationFn: async ({ file, order }) => {
      const stop = new AbortController();
      stopping.current = stop;
      try {
        const uploadId = await sendWhole(file, sessionId, stop.signal, setSending);
        setSending(undefined);
        await untilLookedAt(uploadId, stop.signal);
        const body = { ...order, uploadId };
        await sendJson(askedRecording, `${api}/sessions/${sessionId}/recordings`, { method: "POST", body });
      } finally {
        setSending(undefined);
      }
    },
    onSettled: () => client.invalidateQueries({ queryKey: keyOf(sessionId) }),
  });
  const start = useCallback(
    (file: File, order: RecordingToSend, then: () => void) => sent.mutate({ file, order }, { onSuccess: then }),
    [sent],
  );
  return {
    sending,
    waiting: sent.isPending && sending === undefined,
    error: sent.error,
    send: start,
    cancel: () => stopping.current?.abort(),
  };
}

const broken = (detail: string): ApiError => new ApiError("offline", detail);
const cancelled = (): ApiError => broken("Sending was cancelled. Nothing was kept.");

/** What was announced for a file of this page: sending it again goes on where it stood. */
const announced = new WeakMap<File, { uploadId: string; address: string }>();

async function sendWhole(
  file: File,
  sessionId: string,
  signal: AbortSignal,
  told: (sending: Sending) => void,
): Promise<string> {
  const body = { purpose: "recording", subjectId: sessionId, name: file.name, bytes: file.size };
  const known = announced.get(file);
  const { uploadId, address } =
    known ?? (await sendJson(begunUpload, "/api/v1/uploads", { method: "POST", body, signal }));
  announced.set(file, { uploadId, address });
  const here = { uploadId, name: file.name, bytes: file.size };
  told({ ...here, sentBytes: 0 });
  await new Promise<void>((resolve, reject) => {
    const upload: tus.Upload = piecewise(file, address, {
      onProgress: (sentBytes) => told({ ...here, sentBytes }),
      onError: () => reject(broken(`${file.name} broke off on its way. Send it again to go on where it stood.`)),
      onSuccess: () => {
        announced.delete(file);
        resolve();
      },
    });
    signal.addEventListener("abort", () => {
      announced.delete(file);
      void upload.abort();
      void send(`/api/v1/uploads/${uploadId}`, { method: "DELETE" }).catch(() => undefined);
      reject(cancelled());
    });
    upload.start();
  });
  return uploadId;
}

async function untilLookedAt(uploadId: string, signal: AbortSignal): Promise<UploadAnswer> {
  for (;;) {
    const answer = await getJson(uploadAnswer, `/api/v1/uploads/${uploadId}`, signal);
    if (answer.state === "read") return answer;
    if (answer.state === "refused") {
      throw new ApiError("wrong_kind", `The file was not taken: ${answer.reason ?? "it was refused."}`);
    }
    await new Promise((resolve) => setTimeout(resolve, pollMs));
    if (signal.aborted) throw cancelled();
  }
}

function useRecordingAct<T, B>(write: (body: B) => Promise<T>) {
  const client = useQueryClient();
  return useMutation<T, ApiError, B>({
    mutationFn: write,
    onSettled: () => client.invalidateQueries({ queryKey: benchKeys.all }),
  });
}

/** Keeps what the server read of a recording; of a run, at the run's version. */
export const useKeepRecording = (recordingId: string) =>
  useRecordingAct((body: { version: number | null; reason: string | null }) =>
    sendJson(keptRecording, `${api}/recordings/${recordingId}/keep`, { method: "POST", body }),
  );

/** Notes that this person listened to a recording and heard no voices. */
export const useListened = (recordingId: string) =>
  useRecordingAct((_: undefined) =>
    send(`${api}/recordings/${recordingId}/listened`, { method: "PUT", body: { noVoices: true } }),
  );

/** Breaks the server's reading of a recording off. */
export const useCancelRecording = (recordingId: string) =>
  useRecordingAct((_: undefined) => send(`${api}/recordings/${recordingId}`, { method: "DELETE" }));
