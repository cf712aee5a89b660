import { useMutation, useQuery, useQueryClient, type UseMutationResult } from "@tanstack/react-query";
import type { z } from "zod";
import { startedSession } from "@/lib/contracts/bench-session";
import type { startBenchSession } from "@/lib/contracts/control";
import type { KeepOutUnit } from "@/lib/contracts/keep-outs";
import { levelsTrial, type LevelsTrial } from "@/lib/contracts/seasons-admin";
import { useWrite } from "./act";
import { getJson, send, sendJson, withQuery, type ApiError } from "./fetcher";
import { hostKeys } from "./query-keys";

const at = (path: string) => `/api/v1/host/${path}`;

export const useAddBench = () => useWrite("POST", at("benches"), hostKeys.all);
export const useAddBenchVersion = (benchId: string) =>
  useWrite("POST", at(`benches/${benchId}/versions`), hostKeys.all);
export const useAddPosition = (id: string) => useWrite("POST", at(`bench-versions/${id}/positions`), hostKeys.all);
export const useAddKeepOutBox = (id: string) => useWrite("POST", at(`bench-versions/${id}/keep-outs`), hostKeys.all);
export const useDropKeepOut = (keepOutId: string) => useWrite("DELETE", at(`keep-outs/${keepOutId}`), hostKeys.all);
export const useAddFrame = () => useWrite("POST", at("frames"), hostKeys.all);
export const useChangeFrame = (frameId: string) => useWrite("PUT", at(`frames/${frameId}`), hostKeys.all);
export const useAddBudget = (id: string) => useWrite("POST", at(`bench-versions/${id}/budgets`), hostKeys.all);
export const useDocumentChange = (id: string) => useWrite("POST", at(`bench-versions/${id}/changes`), hostKeys.all);

export const useStartBenchSession = (id: string) =>
  useMutation<z.infer<typeof startedSession>, ApiError, z.input<typeof startBenchSession>>({
    mutationFn: (body) => sendJson(startedSession, at(`bench-versions/${id}/sessions`), { method: "POST", body }),
  });
export const useAddBudgetPart = (budgetId: string) => useWrite("POST", at(`budgets/${budgetId}/parts`), hostKeys.all);
export const useAddProtocol = () => useWrite("POST", at("protocols"), hostKeys.all);
export const useAddProtocolVersion = (id: string) => useWrite("POST", at(`protocols/${id}/versions`), hostKeys.all);
export const useAddBaseline = () => useWrite("POST", at("baselines"), hostKeys.all);
export const useAddBaselineUnit = (id: string) => useWrite("POST", at(`baselines/${id}/units`), hostKeys.all);

export const useMakeSeason = () => useWrite("POST", at("seasons"), hostKeys.all);
export const useChangeSeason = (seasonId: string) => useWrite("PUT", at(`seasons/${seasonId}`), hostKeys.all);
export const useMoveSeason = (seasonId: string) => useWrite("POST", at(`seasons/${seasonId}/moves`), hostKeys.all);
export const usePlanRound = (seasonId: string) => useWrite("POST", at(`seasons/${seasonId}/rounds`), hostKeys.all);
export const useAddRoundEntries = (roundId: string) => useWrite("POST", at(`rounds/${roundId}/entries`), hostKeys.all);
export const useTakeOut = (roundId: string, entryId: string) =>
  useWrite("POST", at(`rounds/${roundId}/entries/${entryId}/take-out`), hostKeys.all);
export const useLend = (roundId: string) => useWrite("PUT", at(`rounds/${roundId}/loan`), hostKeys.all);
export const usePublish = (roundId: string) => useWrite("POST", at(`rounds/${roundId}/publish`), hostKeys.all);
export const useMoveEntry = (entryId: string) => useWrite("POST", at(`entries/${entryId}/moves`), hostKeys.all);

export function useEndLoan(roundId: string): UseMutationResult<void, ApiError, void> {
  const client = useQueryClient();
  return useMutation<void, ApiError, void>({
    mutationFn: () => send(at(`rounds/${roundId}/loan`), { method: "DELETE" }),
    onSuccess: () => client.invalidateQueries({ queryKey: hostKeys.all }),
  });
}

export interface MeshToAdd {
  file: File;
  query: { name: string; note: string; unit: KeepOutUnit };
}

/** Sends a keep-out solid's model file; the server reads it before it answers. */
export function useAddKeepOutMesh(benchVersionId: string): UseMutationResult<void, ApiError, MeshToAdd> {
  const client = useQueryClient();
  return useMutation<void, ApiError, MeshToAdd>({
    mutationFn: ({ file, query }) =>
      send(withQuery(at(`bench-versions/${benchVersionId}/keep-out-meshes`), query), {
        method: "POST",
        file: { content: file, type: "application/octet-stream" },
      }),
    onSuccess: () => client.invalidateQueries({ queryKey: hostKeys.all }),
  });
}

/** How many past entries a choice of levels leaves unranked; asked only while the choice is a list of numbers. */
export function useTryLevels(levels: readonly number[]) {
  return useQuery<LevelsTrial, ApiError>({
    queryKey: hostKeys.list({ levels }),
    queryFn: ({ signal }) =>
      getJson(levelsTrial, withQuery(at("seasons/levels"), { levels: levels.join(",") }), signal),
    enabled: levels.length > 0,
  });
}
