import { appDb } from "@/db/client/handles";
import { qualifiedSpeeds } from "@/db/queries/agreed";
import { benchControl } from "@/db/queries/bench-control";
import { handlesOf } from "@/db/queries/people";
import type { BenchControl } from "@/lib/contracts/control";
import type { Actor } from "@/lib/domain/accounts/actor";
import { checklistItems } from "@/lib/domain/bench/cautions";
import { ExpectedError } from "@/lib/domain/expected-error";
import { demand } from "../permission";

/** A bench version's qualification, newest sessions and documented changes, for the host. */
export async function readBenchControl(
  actor: Actor,
  { benchVersionId }: { benchVersionId: string },
): Promise<BenchControl> {
  demand(actor, "bench.manage");
  const db = appDb();
  const found = await benchControl(db, { benchVersionId });
  if (!found) throw new ExpectedError("not_found", "There is no such bench version.");
  const handles = await handlesOf(db, { personIds: found.changes.map((change) => change.byPerson) });
  return {
    bench: found.bench,
    qualifiedSpeeds: await qualifiedSpeeds(db, { benchVersionId }),
    sessions: found.sessions.map(({ beganAt, endedAt, ...session }) => ({
      ...session,
      beganAt: beganAt.toISOString(),
      endedAt: endedAt?.toISOString() ?? null,
    })),
    changes: found.changes.map(({ fromAt, byPerson, ...change }) => ({
      ...change,
      from: fromAt.toISOString(),
      by: handles.get(byPerson) ?? null,
    })),
    checklist: Object.entries(checklistItems).map(([key, words]) => ({ key, words })),
  };
}
