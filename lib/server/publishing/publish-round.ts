import type { Handle } from "@/db/client/connect";
import { moveEntries, moveRound } from "@/db/queries/moves";
import {
  insertEvent,
  insertPublication,
  listedTraits,
  microphoneDistances,
  upsertPublishedEntry,
  writeRanks,
} from "@/db/queries/publishing";
import { openHolds, standingSignature } from "@/db/queries/review";
import { publishedSessionsOfSeason, roundContext, type RoundContext } from "@/db/queries/round-context";
import { sessionRecords } from "@/db/queries/session-record";
import { newestRuleVersion, type RuleVersion } from "@/db/queries/standings";
import { ExpectedError } from "@/lib/domain/expected-error";
import { METHOD_V1 } from "@/lib/domain/results/methods/v1/parameters";
import { note, type Asked } from "../audit/audit";
import { roundDigest } from "../review/round-digest";
import { digestOf } from "./digest";
import { publishedRow } from "./published-row";
import { computedSessions, makersOf } from "./session-loading";
import { buildSnapshot } from "./snapshot";
import { addStanding, standingDraws } from "./standing";

export interface PublishedRound {
  roundId: string;
  publicationIds: string[];
}

/**
 * Publishes a scheduled round within the caller's transaction: snapshots, the read model, standings of the round and
 * of the season under the season's rule and the plain sum, moves, and the event, or nothing of it.
 *
 * @param draws simulated rounds of the standings
 * @throws ExpectedError moved_on when the round is not scheduled, or when what was signed is not what stands now
 */
export async function publishRound(
  tx: Handle,
  asked: Asked,
  { roundId, at, draws = standingDraws }: { roundId: string; at: Date; draws?: number },
): Promise<PublishedRound> {
  const round = await roundContext(tx, { roundId, lock: true });
  if (round.state !== "scheduled") throw new ExpectedError("moved_on", `The round is ${round.state}, not scheduled.`);
  const signature = await standingSignature(tx, { roundId });
  if (!signature || signature.signedSha256 !== (await roundDigest(tx, round))) {
    throw new ExpectedError("moved_on", "What was signed is not what stands now: the round goes back to review.");
  }
  if (round.entries.some((entry) => entry.state !== "in_review")) {
    throw new ExpectedError("moved_on", "An entry of the round is not in review any more.");
  }
  const [held] = await openHolds(tx, { roundId });
  if (held) throw new ExpectedError("moved_on", `A session of this round is held since: ${held.reason}`);
  const publicationIds = await publishEntries(tx, round, at);
  await moveEntries(
    tx,
    round.entries.map(({ entryId }) => ({
      entryId,
      from: "in_review",
      to: "published",
      byPerson: null,
      byRight: "publication",
      at,
    })),
  );
  await moveRound(tx, { roundId, from: "scheduled", to: "published", byPerson: null, at });
  await addStandings(tx, round, at, draws);
  await insertEvent(tx, {
    kind: "round.published",
    subject: { roundId, seasonId: round.seasonId, publicationIds },
    consumers: ["mail", "feed"],
    at,
  });
  await note(tx, asked, {
    action: "round.publish",
    subjectKind: "round",
    subjectId: roundId,
    after: { publicationIds },
  });
  return { roundId, publicationIds };
}

async function publishEntries(tx: Handle, round: RoundContext, at: Date): Promise<string[]> {
  const sessionIds = [...new Set(round.entries.flatMap((entry) => entry.sessionId ?? []))];
  const sessions = await computedSessions(tx, { sessionIds });
  const records = [...sessions.values()].map((session) => session.record);
  const makers = await makersOf(tx, {
    revisionIds: round.entries.map((entry) => entry.revisionId),
    baselineUnitIds: records.map((record) => record.baselineUnitId),
  });
  const distances = await microphoneDistances(tx, { benchVersionIds: records.map((each) => each.benchVersionId) });
  const traits = await listedTraits(tx, { revisionIds: round.entries.map((entry) => entry.revisionId) });
  const publicationIds: string[] = [];
  for (const entry of round.entries) {
    const session = sessions.get(entry.sessionId ?? "");
    const listed = traits.get(entry.revisionId);
    if (!session || !listed) throw new ExpectedError("moved_on", "An entry of the round has no figures or no traits.");
    const microphoneDistanceMm = distances.get(session.record.benchVersionId) ?? Number.NaN;
    const snapshot = buildSnapshot(session, {
      round,
      entry,
      microphoneDistanceMm,
      makers: makers(entry.revisionId, session.record.baselineUnitId),
    });
    const { id } = await insertPublication(tx, {
      entryId: entry.entryId,
      roundId: round.roundId,
      snapshot,
      sha256: digestOf(snapshot),
      methodVersion: METHOD_V1.version,
      sessionIds: [session.record.sessionId],
      at,
    });
    await upsertPublishedEntry(tx, publishedRow({ publicationId: id, snapshot, traits: listed, at }));
    publicationIds.push(id);
  }
  return publicationIds;
}

/** Seeds are counted from what is published, so that a standing can be drawn again by anybody. */
function seedOf(seasonNumber: number, roundNumber: number, kind: "round" | "season"): number {
  return seasonNumber * 100_000 + roundNumber * 10 + (kind === "round" ? 1 : 2);
}

async function addStandings(tx: Handle, round: RoundContext, at: Date, draws: number): Promise<void> {
  const season: RuleVersion = { id: round.ruleVersionId, kind: round.ruleKind, parameters: round.ruleParameters };
  const naive = await newestRuleVersion(tx, { kind: "plain-sum" });
  const rules = naive && naive.id !== season.id ? [season, naive] : [season];
  const inSeason = await publishedSessionsOfSeason(tx, { seasonId: round.seasonId });
  // Read once for all standings: a season's readings are many.
  const records = await sessionRecords(tx, { sessionIds: [...new Set(inSeason.map((each) => each.sessionId))] });
  const scopes = [
    {
      scope: "round" as const,
      roundId: round.roundId,
      entries: inSeason.filter((each) => each.roundId === round.roundId),
    },
    { scope: "season" as const, roundId: null, entries: inSeason },
  ];
  for (const rule of rules) {
    for (const { scope, roundId, entries } of scopes) {
      const { rows } = await addStanding(tx, {
        seasonId: round.seasonId,
        roundId,
        entries,
        records,
        rule,
        levelsDba: round.levelsDba,
        headlineDba: round.headlineDba,
        asOf: at,
        draws,
        seed: seedOf(round.seasonNumber, round.number, scope),
      });
      if (rule.id === season.id) await writeRanks(tx, { scope, rows });
    }
  }
}
