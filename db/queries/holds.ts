import type { Handle } from "../client/connect";

export interface HoldRow {
  id: string;
  sessionId: string;
  code: string;
  reason: string;
  whatToDo: string;
  raisedBy: string | null;
  raisedAt: Date;
  liftedBy: string | null;
  liftedAt: Date | null;
  liftNote: string | null;
  /** Raised by the control charts. */
  control: boolean;
  /** The documented change that lifted it. */
  breakId: string | null;
}

export async function insertHolds(
  db: Handle,
  {
    sessionId,
    findings,
    raisedBy,
    at,
    control = false,
  }: {
    sessionId: string;
    findings: readonly { code: string; reason: string; whatToDo: string }[];
    raisedBy: string | null;
    at: Date;
    control?: boolean;
  },
): Promise<void> {
  if (findings.length === 0) return;
  await db("session_hold").insert(
    findings.map(({ code, reason, whatToDo }) => ({
      session_id: sessionId,
      code,
      reason,
      what_to_do: whatToDo,
      raised_by: raisedBy,
      raised_at: at,
      control,
    })),
  );
}

/** Holds of a session, lifted ones too, the oldest first. */
export async function holdsOfSession(db: Handle, { sessionId }: { sessionId: string }): Promise<HoldRow[]> {
  return db("session_hold").where({ session_id: sessionId }).orderBy(["raised_at", "id"]).select<HoldRow[]>({
    id: "id",
    sessionId: "session_id",
    code: "code",
    reason: "reason",
    whatToDo: "what_to_do",
    raisedBy: "raised_by",
    raisedAt: "raised_at",
    liftedBy: "lifted_by",
    liftedAt: "lifted_at",
    liftNote: "lift_note",
    control: "control",
    breakId: "break_id",
  });
}

/** Lifts a hold that stands. @returns whether it stood */
export async function liftHoldRow(
  db: Handle,
  {
    holdId,
    liftedBy,
    liftNote,
    at,
    breakId = null,
  }: { holdId: string; liftedBy: string; liftNote: string; at: Date; breakId?: string | null },
): Promise<boolean> {
  const lifted = await db("session_hold")
    .where({ id: holdId })
    .whereNull("lifted_at")
    .update({ lifted_by: liftedBy, lifted_at: at, lift_note: liftNote, break_id: breakId });
  return lifted === 1;
}
