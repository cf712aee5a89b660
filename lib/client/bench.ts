"use client";

import { useMutation, useQuery, useQueryClient, type UseMutationResult } from "@tanstack/react-query";
import type { z } from "zod";
import type { newRun, runReadings, runState, sessionChange, sessionReading, startSession } from "@/lib/contracts/bench";
import {
  benchSession,
  endedSession,
  savedReading,
  savedReadings,
  savedRun,
  savedVersion,
  startedSession,
  type BenchSession,
} from "@/lib/contracts/bench-session";
import { logAnswer, type LogAnswer } from "@/lib/contracts/bench-logs";
import { getJson, send, sendJson, withQuery, type ApiError } from "./fetcher";
import { benchKeys } from "./query-keys";

export type BenchWrite<T, B> = UseMutationResult<T, ApiError, B>;

/** Whatever came of a write, the stored state is read again: a refusal may mean that somebody else changed it. */
function useBenchWrite<T, B>(write: (body: B) => Promise<T>): BenchWrite<T, B> {
  const client = useQueryClient();
  return useMutation<T, ApiError, B>({
    mutationFn: write,
    onSettled: () => client.invalidateQueries({ queryKey: benchKeys.all }),
  });
}

const api = "/api/v1/bench";

/** One session as it stands; while it is open it is read again every ten seconds, for the other operator's changes. */
export function useBenchSession(initial: BenchSession) {
  return useQuery<BenchSession, ApiError>({
    queryKey: benchKeys.one(initial.id),
    queryFn: ({ signal }) => getJson(benchSession, `${api}/sessions/${initial.id}`, signal),
    initialData: initial,
    refetchInterval: ({ state }) => (state.data?.endedAt ? false : 10_000),
  });
}

export const useStartSession = () =>
  useBenchWrite((body: z.input<typeof startSession>) =>
    sendJson(startedSession, `${api}/sessions`, { method: "POST", body }),
  );

export const useEditSession = (sessionId: string) =>
  useBenchWrite((body: z.input<typeof sessionChange>) =>
    sendJson(savedVersion, `${api}/sessions/${sessionId}`, { method: "PATCH", body }),
  );

export const useEndSession = (sessionId: string) =>
  useBenchWrite(() => sendJson(endedSession, `${api}/sessions/${sessionId}/end`, { method: "POST", body: {} }));

export const useKeepSessionReading = (sessionId: string) =>
  useBenchWrite((body: z.input<typeof sessionReading>) =>
    sendJson(savedReading, `${api}/sessions/${sessionId}/readings`, { method: "POST", body }),
  );

export const useAddRun = (sessionId: string) =>
  useBenchWrite((body: z.input<typeof newRun>) =>
    sendJson(savedRun, `${api}/sessions/${sessionId}/runs`, { method: "POST", body }),
  );

export const useKeepReadings = (runId: string) =>
  useBenchWrite((body: z.input<typeof runReadings>) =>
    sendJson(savedReadings, `${api}/runs/${runId}/readings`, { method: "POST", body }),
  );

export const useRunState = () =>
  useBenchWrite(({ runId, ...body }: { runId: string } & z.input<typeof runState>) =>
    sendJson(savedVersion, `${api}/runs/${runId}/state`, { method: "PUT", body }),
  );

export const useSupersede = (readingId: string) =>
  useBenchWrite((body: { value: number; reason: string }) =>
    sendJson(savedReading, `${api}/readings/${readingId}/supersede`, { method: "POST", body }),
  );

export const useHoldSession = (sessionId: string) =>
  useBenchWrite((body: { reason: string }) => send(`${api}/sessions/${sessionId}/holds`, { method: "POST", body }));

export const useLiftHold = (sessionId: string, holdId: string) =>
  useBenchWrite((body: { note: string }) =>
    send(`${api}/sessions/${sessionId}/holds/${holdId}/lift`, { method: "POST", body }),
  );

export interface LogToSend {
  file: File;
  query: Record<string, string | number | undefined>;
}

/** Sends a log to be read, or with `commit=yes` to be kept. */
export const useSendLog = (sessionId: string) =>
  useBenchWrite<LogAnswer, LogToSend>(({ file, query }) =>
    sendJson(logAnswer, withQuery(`${api}/sessions/${sessionId}/logs`, query), {
      method: "POST",
      file: { content: file, type: "text/csv" },
    }),
  );
