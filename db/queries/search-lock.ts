import type { Handle } from "../client/connect";

/** The number that stands for "sending to the search index" among PostgreSQL's advisory locks. */
const advisoryLock = 7_246_002;

export interface SenderLock {
  /** Aborted when the connection that holds the lock is lost, and the lock with it. */
  lost: AbortSignal;
  /** Resolves at the next mark, at the end of the time, or when `until` is aborted; a mark since the last call counts. */
  woken(withinMs: number, until: AbortSignal): Promise<void>;
  release(): Promise<void>;
}

interface RawConnection {
  query(text: string, values?: unknown[]): Promise<{ rows: { locked?: boolean }[] }>;
  on(event: string, listener: () => void): void;
  removeListener(event: string, listener: () => void): void;
}

interface RawClient {
  acquireConnection(): Promise<RawConnection>;
  releaseConnection(connection: RawConnection): Promise<void>;
}

/**
 * Becomes the one sender, or gives undefined when another is. The lock belongs to a session of the server's: it goes
 * when this process dies or its connection breaks.
 */
export async function takeSenderLock(db: Handle): Promise<SenderLock | undefined> {
  const client = db.client as RawClient;
  const connection = await client.acquireConnection();
  const taken = await tryLock(connection).catch(async (error: unknown) => {
    await client.releaseConnection(connection);
    throw error;
  });
  if (!taken) {
    await client.releaseConnection(connection);
    return undefined;
  }
  const losing = new AbortController();
  let marked = false;
  let wake: () => void = () => undefined;
  const onMark = (): void => {
    marked = true;
    wake();
  };
  const onEnd = (): void => losing.abort();
  connection.on("notification", onMark);
  connection.on("end", onEnd);
  connection.on("error", onEnd);
  return {
    lost: losing.signal,
    async woken(withinMs, until) {
      if (!marked && !until.aborted) {
        await new Promise<void>((resolve) => {
          const timer = setTimeout(resolve, withinMs);
          wake = () => {
            clearTimeout(timer);
            resolve();
          };
          until.addEventListener("abort", wake, { once: true });
        });
        until.removeEventListener("abort", wake);
        wake = () => undefined;
      }
      marked = false;
    },
    async release() {
      connection.removeListener("notification", onMark);
      connection.removeListener("end", onEnd);
      await connection.query("unlisten search_outbox").catch(() => undefined);
      await connection.query("select pg_advisory_unlock($1)", [advisoryLock]).catch(() => undefined);
      connection.removeListener("error", onEnd);
      await client.releaseConnection(connection);
    },
  };
}

/** Takes the lock and listens for marks; false when another session has it. */
async function tryLock(connection: RawConnection): Promise<boolean> {
  const { rows } = await connection.query("select pg_try_advisory_lock($1) as locked", [advisoryLock]);
  if (rows[0]?.locked !== true) return false;
  await connection.query("listen search_outbox");
  return true;
}
