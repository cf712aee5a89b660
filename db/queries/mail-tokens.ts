import type { Handle } from "@/db/client/connect";

export type TokenPurpose = "verify" | "reset" | "change_email";

/** Adds a token and drops the earlier ones for the same purpose: the newest link is the one that works. */
export async function insertMailToken(
  handle: Handle,
  params: { personId: string; purpose: TokenPurpose; tokenHash: string; newEmail?: string; lastsS: number },
): Promise<void> {
  await handle("mail_token")
    .where({ person_id: params.personId, purpose: params.purpose })
    .whereNull("used_at")
    .delete();
  await handle("mail_token").insert({
    person_id: params.personId,
    purpose: params.purpose,
    token_hash: params.tokenHash,
    new_email: params.newEmail ?? null,
    expires_at: handle.raw("now() + make_interval(secs => ?)", [params.lastsS]),
  });
}

/** Spends a token; undefined when there is none of that hash and purpose, or it was spent or has run out. */
export async function spendMailToken(
  handle: Handle,
  { tokenHash, purpose }: { tokenHash: string; purpose: TokenPurpose },
): Promise<{ personId: string; newEmail: string | null } | undefined> {
  const rows: { person_id: string; new_email: string | null }[] = await handle("mail_token")
    .where({ token_hash: tokenHash, purpose })
    .whereNull("used_at")
    .where("expires_at", ">", handle.fn.now())
    .update({ used_at: handle.fn.now() })
    .returning(["person_id", "new_email"]);
  const row = rows[0];
  return row && { personId: row.person_id, newEmail: row.new_email };
}

export async function deleteMailTokens(handle: Handle, { personId }: { personId: string }): Promise<void> {
  await handle("mail_token").where({ person_id: personId }).delete();
}
