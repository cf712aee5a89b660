import { useMutation, useQueryClient, type UseMutationResult } from "@tanstack/react-query";
import { designMade } from "@/lib/contracts/own-designs";
import { useWrite, type Sent } from "./act";
import { sendJson, type ApiError } from "./fetcher";
import { myDesignKeys } from "./query-keys";

const base = "/api/v1/my/designs";

export function useMakeDesign(): UseMutationResult<{ slug: string }, ApiError, Sent> {
  const client = useQueryClient();
  return useMutation<{ slug: string }, ApiError, Sent>({
    mutationFn: (body) => sendJson(designMade, base, { method: "POST", body }),
    onSuccess: () => client.invalidateQueries({ queryKey: myDesignKeys.all }),
  });
}

export const useAddRevision = (slug: string) => useWrite("POST", `${base}/${slug}/revisions`, myDesignKeys.all);
export const useSendIn = (slug: string) => useWrite("POST", `${base}/${slug}/entries`, myDesignKeys.all);
export const useMoveOwnEntry = (slug: string, entryId: string) =>
  useWrite("POST", `${base}/${slug}/entries/${entryId}/moves`, myDesignKeys.all);
