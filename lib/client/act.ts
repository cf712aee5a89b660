import { useMutation, useQueryClient, type QueryKey, type UseMutationResult } from "@tanstack/react-query";
import { send, type ApiError } from "./fetcher";

/** What a form of an act hands over. */
export type Sent = Readonly<Record<string, unknown>>;
export type Act = UseMutationResult<void, ApiError, Sent>;

/** A write whose answer isn't needed: what it touches is read anew afterwards. */
export function useWrite(method: "POST" | "PUT" | "PATCH" | "DELETE", path: string, touches: QueryKey): Act {
  const client = useQueryClient();
  return useMutation<void, ApiError, Sent>({
    mutationFn: (body) => send(path, { method, body }),
    onSuccess: () => client.invalidateQueries({ queryKey: touches }),
  });
}
