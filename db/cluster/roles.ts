import pg from "pg";
import type { Passwords } from "./passwords";

/** The three roles of the product; migrations grant to the second and third by these names. */
export const roleNames = { owner: "fanfold_owner", app: "fanfold_app", public: "fanfold_public" } as const;

/** Runs statements over one connection and closes it. */
export async function withClient<T>(url: string, work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client({ connectionString: url, connectionTimeoutMillis: 5_000 });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

/** Makes the roles where they are missing and sets their passwords to those of the folder. */
export async function ensureRoles(adminUrl: string, passwords: Passwords): Promise<void> {
  await withClient(adminUrl, async (client) => {
    for (const key of ["owner", "app", "public"] as const) {
      const name = client.escapeIdentifier(roleNames[key]);
      const known = await client.query("select 1 from pg_roles where rolname = $1", [roleNames[key]]);
      if (known.rowCount === 0) await client.query(`create role ${name}`);
      const password = client.escapeLiteral(passwords[key]);
      await client.query(`alter role ${name} login nosuperuser nocreatedb nocreaterole inherit password ${password}`);
    }
    await client.query(
      `alter role ${client.escapeIdentifier(roleNames.public)} set default_transaction_read_only = on`,
    );
  });
}

/**
 * Makes a database that belongs to the owner role, where it is missing. The other two may connect and use what
 * migrations grant; nobody else may.
 *
 * @param template a database to copy, on which nobody may be connected
 */
export async function ensureDatabase(adminUrl: string, database: string, template?: string): Promise<void> {
  await withClient(adminUrl, async (client) => {
    const known = await client.query("select 1 from pg_database where datname = $1", [database]);
    if (known.rowCount !== 0) return;
    const quoted = client.escapeIdentifier(database);
    const from = template === undefined ? "" : ` template ${client.escapeIdentifier(template)}`;
    await client.query(`create database ${quoted} owner ${client.escapeIdentifier(roleNames.owner)}${from}`);
    await client.query(`revoke all on database ${quoted} from public`);
    await client.query(`grant connect, temporary on database ${quoted} to ${roleNames.app}`);
    await client.query(`grant connect on database ${quoted} to ${roleNames.public}`);
  });
}

/** Drops a database, ending the sessions that are on it. */
export async function dropDatabase(adminUrl: string, database: string): Promise<void> {
  await withClient(adminUrl, (client) =>
    client.query(`drop database if exists ${client.escapeIdentifier(database)} with (force)`),
  );
}
