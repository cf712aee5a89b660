import type { Handle } from "./connect";

/** What other libraries ask of a connection: numbered parameters in, rows out. */
export interface SqlExecutor {
  executeSql(text: string, values?: unknown[]): Promise<{ rows: unknown[] }>;
}

/**
 * Lets a library that writes `$1` run within our handle, so within our transaction.
 * Knex takes `?` in the order of appearance, hence values are put in that order, and a literal `?` is escaped.
 */
export function sqlExecutor(handle: Handle): SqlExecutor {
  return {
    async executeSql(text, values = []) {
      const { sql, bindings } = withQuestionMarks(text, values);
      const result: { rows?: unknown[] } = await handle.raw(sql, bindings);
      return { rows: result.rows ?? [] };
    },
  };
}

/** Rewrites `$n` to `?`; undefined values become null, as the driver would have them. */
export function withQuestionMarks(text: string, values: unknown[]): { sql: string; bindings: (string | number)[] } {
  const bindings: unknown[] = [];
  const sql = text.replace(/\?|\$(\d+)/g, (found: string, number: string | undefined) => {
    if (number === undefined) return `\\${found}`;
    const value = values[Number(number) - 1];
    bindings.push(value === undefined ? null : value);
    return "?";
  });
  return { sql, bindings: bindings as (string | number)[] };
}
