import type { Handle } from "@/db/client/connect";

export interface WindowCount {
  /** Requests of the running window, this one included. */
  count: number;
  /** Requests of the window before. */
  countBefore: number;
  /** Seconds since the running window began. */
  elapsedS: number;
}

/** Counts one request; windows begin at multiples of their length by the database's clock, so all processes agree. */
export async function countRequest(
  handle: Handle,
  { key, windowS }: { key: string; windowS: number },
): Promise<WindowCount> {
  const result: { rows: { count: number; count_before: number; elapsed_s: number }[] } = await handle.raw(
    `with clock as (
       select to_timestamp(floor(extract(epoch from clock_timestamp()) / :windowS) * :windowS) as start, clock_timestamp() as at
     ), counted as (
       insert into rate_window (key, window_start, count) select :key, start, 1 from clock
       on conflict (key, window_start) do update set count = rate_window.count + 1
       returning count
     )
     select counted.count,
       coalesce((select b.count from rate_window b
         where b.key = :key and b.window_start = clock.start - make_interval(secs => :windowS)), 0) as count_before,
       extract(epoch from clock.at - clock.start)::double precision as elapsed_s
     from counted, clock`,
    { key, windowS },
  );
  const row = result.rows[0];
  if (!row) throw new Error("The rate window gave no count.");
  return { count: row.count, countBefore: row.count_before, elapsedS: row.elapsed_s };
}

export interface AttemptCounts {
  /** Failed attempts on the account since its last success within the time. */
  failedOnAccount: number;
  failedFromAddress: number;
}

/** Failed attempts to sign in within the last seconds, on an account and from an address. */
export async function countFailedAttempts(
  handle: Handle,
  { accountKey, address, withinS }: { accountKey: string; address: string; withinS: number },
): Promise<AttemptCounts> {
  const result: { rows: { on_account: number; from_address: number }[] } = await handle.raw(
    `with since as (select clock_timestamp() - make_interval(secs => :withinS) as at)
     select
       (select count(*) from sign_in_attempt a, since where a.account_key = :accountKey and not a.succeeded
          and a.at > greatest(since.at, coalesce((select max(s.at) from sign_in_attempt s
            where s.account_key = :accountKey and s.succeeded), since.at))) as on_account,
       (select count(*) from sign_in_attempt a, since
          where a.address = :address and not a.succeeded and a.at > since.at) as from_address`,
    { accountKey, address, withinS },
  );
  const row = result.rows[0];
  return { failedOnAccount: row?.on_account ?? 0, failedFromAddress: row?.from_address ?? 0 };
}

/** Records an attempt as failed until it is known better; gives its id. */
export async function beginAttempt(
  handle: Handle,
  { accountKey, address }: { accountKey: string; address: string },
): Promise<number> {
  const rows: { id: number }[] = await handle("sign_in_attempt")
    .insert({ account_key: accountKey, address, succeeded: false, at: handle.raw("clock_timestamp()") })
    .returning("id");
  const row = rows[0];
  if (!row) throw new Error("The attempt got no id.");
  return row.id;
}

export async function markSucceeded(handle: Handle, { attemptId }: { attemptId: number }): Promise<void> {
  await handle("sign_in_attempt")
    .where({ id: attemptId })
    .update({ succeeded: true, at: handle.raw("clock_timestamp()") });
}

/** An attempt that wasn't looked at doesn't count, or whoever keeps trying would keep the owner out for ever. */
export async function dropAttempt(handle: Handle, { attemptId }: { attemptId: number }): Promise<void> {
  await handle("sign_in_attempt").where({ id: attemptId }).delete();
}

/** Deletes what no window looks at any more. */
export async function sweepThrottle(handle: Handle): Promise<void> {
  await handle.raw(`delete from rate_window where window_start < now() - interval '2 days'`);
  await handle.raw(`delete from sign_in_attempt where at < now() - interval '30 days'`);
  await handle.raw(`delete from idempotency_key where created_at < now() - interval '2 days'`);
  await handle.raw(`delete from mail_token where expires_at < now() - interval '7 days'`);
}
