"use client";

import { useMutation, useQuery, useQueryClient, type UseMutationResult } from "@tanstack/react-query";
import type { z } from "zod";
import {
  benchQueue,
  madeSpecimen,
  movedEntry,
  movedRound,
  printJobs,
  type BenchMove,
  type BenchQueue,
  type newSpecimen,
  type partRecord,
  type PrintJob,
} from "@/lib/contracts/bench-prints";
import { getJson, send, sendJson, type ApiError } from "./fetcher";
import { benchKeys } from "./query-keys";

const api = "/api/v1/bench";

function usePrintWrite<T, B>(write: (body: B) => Promise<T>): UseMutationResult<T, ApiError, B> {
  const client = useQueryClient();
  return useMutation<T, ApiError, B>({
    mutationFn: write,
    onSettled: () => client.invalidateQueries({ queryKey: benchKeys.all }),
  });
}

export function useBenchQueue(initial: BenchQueue) {
  return useQuery<BenchQueue, ApiError>({
    queryKey: benchKeys.list({ what: "queue" }),
    queryFn: ({ signal }) => getJson(benchQueue, `${api}/queue`, signal),
    initialData: initial,
  });
}

export function usePrintJobs(initial: { items: PrintJob[] }) {
  return useQuery<{ items: PrintJob[] }, ApiError>({
    queryKey: benchKeys.list({ what: "prints" }),
    queryFn: ({ signal }) => getJson(printJobs, `${api}/prints`, signal),
    initialData: initial,
  });
}

export const useMoveEntry = (entryId: string) =>
  usePrintWrite((body: BenchMove) => sendJson(movedEntry, `${api}/entries/${entryId}/moves`, { method: "POST", body }));

export const useRoundToReview = (roundId: string) =>
  usePrintWrite(() => sendJson(movedRound, `${api}/rounds/${roundId}/to-review`, { method: "POST", body: {} }));

export const useAddSpecimen = () =>
  usePrintWrite((body: z.input<typeof newSpecimen>) =>
    sendJson(madeSpecimen, `${api}/specimens`, { method: "POST", body }),
  );

export const useRecordPart = (specimenId: string, position: number) =>
  usePrintWrite((body: z.input<typeof partRecord>) =>
    send(`${api}/specimens/${specimenId}/parts/${position}`, { method: "PUT", body }),
  );
