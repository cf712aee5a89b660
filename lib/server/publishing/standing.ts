import type { Handle } from "@/db/client/connect";
import { bridges, seasonBaselineUnit } from "@/db/queries/bridges";
import { sessionRecords } from "@/db/queries/session-record";
import { insertStanding, type StandingRow } from "@/db/queries/standings";
import { groupBy } from "@/lib/domain/group-by";
import { standardUncertainty } from "@/lib/domain/results/effects";
import { METHOD_V1 } from "@/lib/domain/results/methods/v1/parameters";
import { sessionPoints } from "@/lib/domain/results/methods/v1/session-points";
import { roundResult } from "@/lib/domain/results/rounding";
import { protocolPositionIds } from "@/lib/domain/results/session-figures";
import type { SessionRecord } from "@/lib/domain/results/session-record";
import type { RoundInput, RoundSession } from "@/lib/domain/scoring/round-input";
import type { RuleKind } from "@/lib/domain/scoring/rules";
import { scoreRound } from "@/lib/domain/scoring/score-round";

/** Which entries stand in it, each with the session that it rests on, and by which rule they are scored. */
export interface StandingRequest {
  seasonId: string;
  roundId: string | null;
  entries: readonly { entryId: string; sessionId: string }[];
  rule: { id: string; kind: RuleKind; parameters: { m?: number } };
  levelsDba: readonly number[];
  headlineDba: number;
  asOf: Date;
  draws: number;
  seed: number;
  dryCorrections?: readonly string[];
  /** Records that the caller has read already, of at least these sessions; else they are read. */
  records?: readonly SessionRecord[];
}

/** Simulated rounds of a standing: the standard error of a probability is then 0.005 at most. */
export const standingDraws = 10_000;

/** The input of a standing from stored readings: the same that `read -- round` takes from a file. */
export async function standingInput(db: Handle, request: StandingRequest): Promise<RoundInput> {
  const bySession = groupBy(request.entries, (entry) => entry.sessionId);
  const sessionIds = [...bySession.keys()].sort();
  const known = new Map(request.records?.map((record) => [record.sessionId, record]));
  const records = request.records
    ? sessionIds.flatMap((id) => known.get(id) ?? [])
    : await sessionRecords(db, { sessionIds, dryCorrections: request.dryCorrections });
  const sessions = records.flatMap((record): RoundSession[] => {
    const { subjects } = sessionPoints(record, protocolPositionIds(record));
    const baseline = subjects.find((subject) => subject.baselineUnitId === record.baselineUnitId);
    if (!baseline) return [];
    const wanted = new Set(bySession.get(record.sessionId)?.map((entry) => entry.entryId));
    const entries = subjects
      .flatMap((subject) =>
        subject.entryId !== null && wanted.has(subject.entryId)
          ? [{ id: subject.entryId, points: subject.points }]
          : [],
      )
      .sort((a, b) => (a.id < b.id ? -1 : 1));
    return [{ id: record.sessionId, baseline: { unit: record.baselineUnitId, points: baseline.points }, entries }];
  });
  return {
    sessions,
    rule: {
      kind: request.rule.kind,
      levelsDba: request.levelsDba,
      headlineDba: request.headlineDba,
      ...request.rule.parameters,
    },
    grade: records[0]?.grade ?? "engineering",
    seed: request.seed,
    draws: request.draws,
    baselineUnit: await seasonBaselineUnit(db, { seasonId: request.seasonId }),
    bridges: await bridges(db, { levelDba: request.headlineDba, asOf: request.asOf }),
  };
}

/** Scores and ranks; rows rounded as they are stored, best first, those not ranked last. */
export function standingRows(input: RoundInput): StandingRow[] {
  const { sessions, ranked, letters } = scoreRound(input);
  const rows = sessions.flatMap(({ entries }) =>
    entries.map((entry): StandingRow => {
      const place = ranked.get(entry.id);
      return {
        entryId: entry.id,
        score: entry.score ? roundResult(entry.score.value) : null,
        uScore: entry.score ? roundResult(standardUncertainty(entry.score.effects)) : null,
        rank: place?.rank ?? null,
        rankLow: place?.spread.low ?? null,
        rankHigh: place?.spread.high ?? null,
        pFirst: place ? roundResult(place.spread.pFirst) : null,
        letters: letters.get(entry.id) ?? null,
        whyNotRanked: place ? null : (entry.whyNotRanked ?? "no figures"),
      };
    }),
  );
  return rows.sort((a, b) => (a.rank ?? Infinity) - (b.rank ?? Infinity) || (a.entryId < b.entryId ? -1 : 1));
}

/** Computes a standing and adds it. @returns its id, number and rows */
export async function addStanding(db: Handle, request: StandingRequest) {
  const rows = standingRows(await standingInput(db, request));
  const head = {
    seasonId: request.seasonId,
    roundId: request.roundId,
    ruleVersionId: request.rule.id,
    asOf: request.asOf,
    draws: request.draws,
    seed: request.seed,
    methodVersion: METHOD_V1.version,
  };
  return { ...(await insertStanding(db, { head, rows })), rows };
}
