import type { Handle } from "@/db/client/connect";

export interface StoredAnswer {
  requestSha256: string;
  status: number | null;
  body: unknown;
}

/**
 * Takes a key for a request. A key that was taken more than `staleS` seconds ago and never answered belongs to a process
 * that died and is taken over.
 *
 * @returns undefined when the key is ours now, else what stands under it
 */
export async function takeKey(
  handle: Handle,
  params: { personId: string; key: string; requestSha256: string; staleS: number },
): Promise<StoredAnswer | undefined> {
  const taken: { rows: unknown[] } = await handle.raw(
    `insert into idempotency_key as k (person_id, key, request_sha256) values (:personId, :key, :requestSha256)
     on conflict (person_id, key) do update set request_sha256 = excluded.request_sha256, created_at = clock_timestamp()
       where k.status is null and k.created_at < clock_timestamp() - make_interval(secs => :staleS)
     returning 1`,
    params,
  );
  if (taken.rows.length > 0) return undefined;
  const row = await handle("idempotency_key")
    .select("request_sha256", "status", "body")
    .where({ person_id: params.personId, key: params.key })
    .first<{ request_sha256: string; status: number | null; body: unknown } | undefined>();
  return row && { requestSha256: row.request_sha256, status: row.status, body: row.body };
}

export async function storeAnswer(
  handle: Handle,
  { personId, key, status, body }: { personId: string; key: string; status: number; body: unknown },
): Promise<void> {
  await handle("idempotency_key")
    .where({ person_id: personId, key })
    .update({ status, body: body === undefined ? null : JSON.stringify(body) });
}

export async function releaseKey(handle: Handle, { personId, key }: { personId: string; key: string }): Promise<void> {
  await handle("idempotency_key").where({ person_id: personId, key, status: null }).delete();
}
