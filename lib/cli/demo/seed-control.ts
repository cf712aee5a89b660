import type { Handle } from "@/db/client/connect";
import { sessionHead } from "@/db/queries/bench-sessions";
import { holdsOfSession, liftHoldRow } from "@/db/queries/holds";
import { isPasteRenewal, isSlip, microphoneSlipped, nothingFound, pasteRenewed } from "@/db/seeds/demo/bench-story";
import type { DemoBench } from "@/db/seeds/demo/seed-bench";
import type { DemoSeason } from "@/db/seeds/demo/seed-seasons";
import { seedSession } from "@/db/seeds/demo/seed-session";
import type { Person } from "@/lib/domain/accounts/actor";
import { createRandom } from "@/lib/science/statistics/random";
import { chartSession } from "@/lib/server/baselines/control-session";
import { documentChange } from "@/lib/server/baselines/document-change";
import { settleSession } from "@/lib/server/baselines/settle-session";
import { computeSession } from "@/lib/server/results/compute-session";

const day = 86_400_000;
const beforeSeasonDays = 18;
/** Draws of its own, so that the rounds are the same with qualifications and without. */
const qualificationSeed = 7_003;

/**
 * Puts a demo session on the control charts, once it is closed. What they hold is let go as at a real bench: by a
 * documented change, or lifted by a second person.
 */
export async function chartDemoSession(
  db: Handle,
  {
    sessionId,
    where,
    host,
    second,
  }: {
    sessionId: string;
    where?: { season: number; round: number; session: number };
    host: Person;
    second: Person;
  },
): Promise<void> {
  const session = await sessionHead(db, { sessionId });
  if (!session?.endedAt) return;
  await chartSession(db, { sessionId, at: session.endedAt });
  const at = new Date(session.endedAt.getTime() + day);
  if (where && isPasteRenewal(where)) {
    const { kind, reason } = pasteRenewed;
    const change = {
      benchVersionId: session.benchVersionId,
      fromSessionId: sessionId,
      kind,
      reason,
      allUnits: true,
      at,
    };
    await documentChange({ actor: host, requestId: null }, change, db);
  }
  const held = (await holdsOfSession(db, { sessionId })).filter((hold) => hold.liftedAt === null);
  const liftNote = where && isSlip(where) ? microphoneSlipped.liftNote : nothingFound;
  for (const { id } of held) await liftHoldRow(db, { holdId: id, liftedBy: second.personId, liftNote, at });
}

/** Ten remounts of a season's baseline unit on its bench version, before it opens; agreed values come from them. */
export async function qualifyDemoBench(
  db: Handle,
  { bench, season, operatorId, host, second }: QualifyDemo,
): Promise<void> {
  const sessionId = await seedSession(db, createRandom(qualificationSeed + season.number), bench, {
    season,
    roundId: null,
    operatorId,
    beganAt: new Date(season.opensAt.getTime() - beforeSeasonDays * day),
    subjects: [],
    closed: true,
  });
  await computeSession(db, sessionId);
  await chartDemoSession(db, { sessionId, host, second });
  const session = await sessionHead(db, { sessionId });
  await settleSession(db, { sessionId, at: session?.endedAt ?? season.opensAt });
}

interface QualifyDemo {
  bench: DemoBench;
  season: DemoSeason;
  operatorId: string;
  host: Person;
  second: Person;
}
