import type { Handle } from "@/db/client/connect";
import type { Role } from "@/lib/domain/accounts/actor";

/** A person as the server knows them; the password's hash is asked for separately, so that it can't travel by mistake. */
export interface PersonRow {
  personId: string;
  email: string | null;
  handle: string | null;
  role: Role;
  emailVerifiedAt: Date | null;
  sessionVersion: number;
  createdAt: Date;
  closedAt: Date | null;
  erasedAt: Date | null;
}

const columns = {
  personId: "id",
  email: "email",
  handle: "handle",
  role: "role",
  emailVerifiedAt: "email_verified_at",
  sessionVersion: "session_version",
  createdAt: "created_at",
  closedAt: "closed_at",
  erasedAt: "erased_at",
};

export async function personById(handle: Handle, { personId }: { personId: string }): Promise<PersonRow | undefined> {
  return handle("person").select(columns).where({ id: personId }).first<PersonRow | undefined>();
}

/** As `personById`, and nobody else changes the row until the transaction ends. */
export async function lockPerson(handle: Handle, { personId }: { personId: string }): Promise<PersonRow | undefined> {
  return handle("person").select(columns).where({ id: personId }).forUpdate().first<PersonRow | undefined>();
}

export async function personByEmail(handle: Handle, { email }: { email: string }): Promise<PersonRow | undefined> {
  return handle("person").select(columns).whereRaw("lower(email) = lower(?)", [email]).first<PersonRow | undefined>();
}

export async function personByHandle(handle: Handle, params: { handle: string }): Promise<PersonRow | undefined> {
  return handle("person")
    .select(columns)
    .whereRaw("lower(handle) = lower(?)", [params.handle])
    .first<PersonRow | undefined>();
}

/** The argon2id hash; undefined when the person has none or isn't there. */
export async function passwordHashOf(handle: Handle, { personId }: { personId: string }): Promise<string | undefined> {
  const row = await handle("person")
    .select("password_hash")
    .where({ id: personId })
    .first<{ password_hash: string | null } | undefined>();
  return row?.password_hash ?? undefined;
}

/** Adds a person unless the address is taken; undefined then. A taken handle is an error of the database's. */
export async function insertPerson(
  handle: Handle,
  params: { email: string; handle: string; passwordHash: string; role?: Role; emailVerifiedAt?: Date },
): Promise<string | undefined> {
  const result: { rows: { id: string }[] } = await handle.raw(
    `insert into person (email, handle, password_hash, role, email_verified_at)
     values (:email, :handle, :passwordHash, :role, :emailVerifiedAt)
     on conflict ((lower(email))) do nothing returning id`,
    { role: "member", ...params, emailVerifiedAt: params.emailVerifiedAt ?? null },
  );
  return result.rows[0]?.id;
}

export interface PersonChange {
  email?: string | null;
  handle?: string | null;
  role?: Role;
  passwordHash?: string | null;
  emailVerifiedAt?: Date;
  closedAt?: Date | null;
  erasedAt?: Date;
  /** Ends every session that was begun before. */
  endSessions?: boolean;
}

/** Changes what is given and leaves the rest. */
export async function updatePerson(
  handle: Handle,
  { personId, change }: { personId: string; change: PersonChange },
): Promise<void> {
  await handle("person")
    .where({ id: personId })
    .update({
      email: change.email,
      handle: change.handle,
      role: change.role,
      password_hash: change.passwordHash,
      email_verified_at: change.emailVerifiedAt,
      closed_at: change.closedAt,
      erased_at: change.erasedAt,
      session_version: change.endSessions ? handle.raw("session_version + 1") : handle.ref("session_version"),
    });
}

/** Hosts with open accounts, locked, so that two changes at once can't take the last two. */
export async function lockHosts(handle: Handle): Promise<string[]> {
  const rows = await handle("person")
    .select({ personId: "id" })
    .where({ role: "host" })
    .whereNull("closed_at")
    .orderBy("id")
    .forUpdate();
  return rows.map((row: { personId: string }) => row.personId);
}

/** People by handle, then id, of which the last page's key is given; erased ones have no handle and aren't listed. */
export async function listPeople(
  handle: Handle,
  params: { contains?: string; role?: Role; after?: { handle: string }; limit: number },
): Promise<PersonRow[]> {
  return handle("person")
    .select(columns)
    .whereNotNull("handle")
    .modify((query) => {
      const { contains, role, after } = params;
      if (contains) {
        const pattern = `%${contains.replace(/[\\%_]/g, "\\$&")}%`;
        query.where((either) => either.whereILike("handle", pattern).orWhereILike("email", pattern));
      }
      if (role) query.where({ role });
      if (after) query.whereRaw("lower(handle) > lower(?)", [after.handle]);
    })
    .orderByRaw("lower(handle)")
    .limit(params.limit);
}

/** Handles by id, for pages that resolve names when they are read; an erased person isn't among them. */
export async function handlesOf(
  handle: Handle,
  { personIds }: { personIds: readonly string[] },
): Promise<Map<string, string>> {
  if (personIds.length === 0) return new Map();
  const rows: { id: string; handle: string }[] = await handle("person")
    .select("id", "handle")
    .whereIn("id", [...new Set(personIds)])
    .whereNotNull("handle");
  return new Map(rows.map((row) => [row.id, row.handle]));
}
