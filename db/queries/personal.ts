import type { Handle } from "@/db/client/connect";

/** Mail choices by topic; topics never chosen are missing. */
export async function mailChoicesOf(handle: Handle, { personId }: { personId: string }): Promise<Map<string, boolean>> {
  const rows: { topic: string; wanted: boolean }[] = await handle("mail_choice")
    .select("topic", "wanted")
    .where({ person_id: personId });
  return new Map(rows.map((row) => [row.topic, row.wanted]));
}

export async function setMailChoices(
  handle: Handle,
  { personId, choices }: { personId: string; choices: Readonly<Record<string, boolean>> },
): Promise<void> {
  const rows = Object.entries(choices).map(([topic, wanted]) => ({ person_id: personId, topic, wanted }));
  await handle("mail_choice").insert(rows).onConflict(["person_id", "topic"]).merge(["wanted"]);
}

/** Deletes what belongs to one person alone: lists, choices, links, answers kept for their requests; ends their tokens. */
export async function deletePersonal(
  handle: Handle,
  { personId, accountKey }: { personId: string; accountKey: string },
): Promise<void> {
  for (const table of ["saved_comparison", "saved_search", "watch", "mail_choice", "mail_token", "idempotency_key"]) {
    await handle(table).where({ person_id: personId }).delete();
  }
  await handle("sign_in_attempt").where({ account_key: accountKey }).delete();
  await handle("access_token")
    .where({ person_id: personId })
    .whereNull("revoked_at")
    .update({ revoked_at: handle.fn.now() });
  await handle("webhook")
    .where({ person_id: personId })
    .whereNull("disabled_at")
    .update({ disabled_at: handle.fn.now() });
}
