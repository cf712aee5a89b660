import type { Handle } from "@/db/client/connect";
import { ownsEntry } from "@/db/queries/bench-entries";
import { sessionHead, type SessionHead } from "@/db/queries/bench-sessions";
import { signingFacts } from "@/db/queries/review";
import type { Person } from "@/lib/domain/accounts/actor";
import { isPerson } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import type { Asked } from "../audit/audit";
import { demand } from "../permission";

/** Whoever works or reads the figures of a session: an operator or host who owns no entry of its round. */
export async function demandBench(
  db: Handle,
  { actor }: Asked,
  { sessionId, lock = false, open = false }: { sessionId: string; lock?: boolean; open?: boolean },
): Promise<{ person: Person; session: SessionHead }> {
  demand(actor, "bench.read");
  const session = await sessionHead(db, { sessionId, lock });
  if (!session) throw new ExpectedError("not_found", "There is no such session.");
  await demandRoundWork(db, { actor, requestId: null }, session.roundId);
  if (open && session.endedAt) throw new ExpectedError("moved_on", "The session is closed: it takes no more readings.");
  return { person: actor, session };
}

/** An operator or host who owns an entry of the round neither works it nor sees its figures before the hour. */
export async function demandRoundWork(db: Handle, { actor }: Asked, roundId: string | null): Promise<void> {
  const facts = roundId && isPerson(actor) ? await signingFacts(db, { roundId, personId: actor.personId }) : undefined;
  demand(actor, "bench.work", { ownedInRound: facts?.ownedInRound ?? false });
}

/** @throws ExpectedError forbidden when the person owns the entry: owners don't work runs of their own entries */
export async function demandNotOwner(db: Handle, person: Person, entryId: string | null): Promise<void> {
  if (entryId && (await ownsEntry(db, { entryId, personId: person.personId }))) {
    throw new ExpectedError("forbidden", "You own this entry: another person works its runs.");
  }
}
