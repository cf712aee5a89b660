import { useMutation, useQueryClient, type UseMutationResult } from "@tanstack/react-query";
import { savedComparison, savedSearch, type SavedComparison, type SavedSearch } from "@/lib/contracts/saved";
import { useWrite, type Act, type Sent } from "./act";
import { sendJson, type ApiError } from "./fetcher";
import { savedKeys } from "./query-keys";

const comparisons = "/api/v1/my/comparisons";
const searches = "/api/v1/my/searches";

export function useSaveComparison(): UseMutationResult<SavedComparison, ApiError, Sent> {
  const client = useQueryClient();
  return useMutation<SavedComparison, ApiError, Sent>({
    mutationFn: (body) => sendJson(savedComparison, comparisons, { method: "POST", body }),
    onSuccess: () => client.invalidateQueries({ queryKey: savedKeys.all }),
  });
}

export const useChangeComparison = (id: string): Act => useWrite("PUT", `${comparisons}/${id}`, savedKeys.all);
export const useDeleteComparison = (id: string): Act => useWrite("DELETE", `${comparisons}/${id}`, savedKeys.all);

export function useSaveSearch(): UseMutationResult<SavedSearch, ApiError, Sent> {
  const client = useQueryClient();
  return useMutation<SavedSearch, ApiError, Sent>({
    mutationFn: (body) => sendJson(savedSearch, searches, { method: "POST", body }),
    onSuccess: () => client.invalidateQueries({ queryKey: savedKeys.all }),
  });
}

export const useDeleteSearch = (id: string): Act => useWrite("DELETE", `${searches}/${id}`, savedKeys.all);
