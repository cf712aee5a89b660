import type { Handle } from "@/db/client/connect";
import { listSessions } from "@/db/queries/bench-sessions";
import { checklistItems } from "@/lib/domain/bench/cautions";
import { ExpectedError } from "@/lib/domain/expected-error";

/** @throws ExpectedError malformed while a caution is not ticked */
export function demandTicked(checklist: Readonly<Record<string, boolean>>): void {
  const missing = Object.keys(checklistItems).filter((item) => checklist[item] !== true);
  if (missing.length === 0) return;
  throw new ExpectedError(
    "malformed",
    "Every caution is ticked before a session starts.",
    missing.map((item) => ({ path: `checklist.${item}`, message: "is not ticked" })),
  );
}

/** @throws ExpectedError moved_on while another session is open on the bench */
export async function demandNoOpenSession(tx: Handle, benchId: string): Promise<void> {
  const there = (await listSessions(tx, { open: true })).find((each) => each.benchId === benchId);
  if (there) throw new ExpectedError("moved_on", `Session ${there.number} is open on this bench: end it first.`);
}
