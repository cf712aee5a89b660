"use client";

import { useQuery, type UseQueryResult } from "@tanstack/react-query";
import { rawRunsSchema, type RawRuns } from "@/lib/contracts/raw-runs";
import { getJson, withQuery, type ApiError } from "./fetcher";
import { keysOf } from "./query-keys";

export const sheetKeys = keysOf("sheets");

/** Every raw reading behind an entry's figures; asked only once `wanted`. What was published stays as it is. */
export function useRawRuns(slug: string, entryId: string, wanted: boolean): UseQueryResult<RawRuns, ApiError> {
  return useQuery<RawRuns, ApiError>({
    queryKey: sheetKeys.one(slug, "readings", entryId),
    queryFn: ({ signal }) =>
      getJson(rawRunsSchema, withQuery(`/api/v1/sheets/${slug}/readings`, { entry: entryId }), signal),
    enabled: wanted,
    staleTime: 600_000,
  });
}
