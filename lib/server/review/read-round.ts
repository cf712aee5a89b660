import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { holdsOfSession } from "@/db/queries/holds";
import { handlesOf } from "@/db/queries/people";
import { microphoneDistances } from "@/db/queries/publishing";
import { changesSince, entryNames, reviewsOfRound, sessionsOfRound, type ChangeRow } from "@/db/queries/review-rounds";
import type { RoundContext, RoundEntryRow } from "@/db/queries/round-context";
import { newestRuleVersion, type RuleVersion } from "@/db/queries/standings";
import type { DryStanding, ReviewEntry, ReviewRound } from "@/lib/contracts/review";
import type { Actor } from "@/lib/domain/accounts/actor";
import { computedSessions, makersOf } from "../publishing/session-loading";
import { buildSnapshot, type ComputedSession } from "../publishing/snapshot";
import { standingInput, standingRows } from "../publishing/standing";
import { personObstacle, roundObstacles } from "./obstacles";
import { demandReviewRound } from "./review-access";
import { roundDigest } from "./round-digest";

/** Fewer than a published standing has, so that a reviewer doesn't wait; the page says how many. */
const dryDraws = 400;

/** A round before its hour: figures as publishing would freeze them, the standing dry, what changed, what stands in the way. */
export async function readRoundForReview(actor: Actor, { roundId }: { roundId: string }): Promise<ReviewRound> {
  const db = appDb();
  const { round } = await demandReviewRound(db, actor, roundId);
  const past = await reviewsOfRound(db, { roundId });
  const sessions = await sessionsOfRound(db, { roundId });
  const handles = await handlesOf(db, {
    personIds: [...past.map((each) => each.reviewerId), ...sessions.map((each) => each.operatorId)],
  });
  const entries = await reviewEntries(db, round, round.entries);
  const refusal = await personObstacle(db, actor, roundId);
  const since = past[0]?.at;
  return {
    roundId,
    seasonNumber: round.seasonNumber,
    number: round.number,
    state: round.state,
    publishAt: round.publishAt?.toISOString() ?? null,
    levelsDba: round.levelsDba,
    headlineDba: round.headlineDba,
    sha256: await roundDigest(db, round),
    mayReview: refusal === undefined,
    whyNotSign: [...(refusal ? [refusal] : []), ...(await roundObstacles(db, round))],
    entries,
    standings: await dryStandings(db, round, entries),
    sessions: await Promise.all(
      sessions.map(async ({ operatorId, beganAt, endedAt, ...session }) => ({
        ...session,
        operator: handles.get(operatorId) ?? null,
        beganAt: beganAt.toISOString(),
        endedAt: endedAt?.toISOString() ?? null,
        holds: (await holdsOfSession(db, session)).map(({ code, reason, raisedAt, liftNote }) => ({
          code,
          reason,
          raisedAt: raisedAt.toISOString(),
          liftNote,
        })),
      })),
    ),
    past: past.map(({ at, reviewerId, verdict, note, entries: back }) => ({
      at: at.toISOString(),
      reviewer: handles.get(reviewerId) ?? null,
      verdict,
      note,
      entries: back,
    })),
    changes: since
      ? (await changesSince(db, { roundId, since })).map((row) => ({
          at: row.at.toISOString(),
          entryId: row.entryId,
          what: changeWords(row),
        }))
      : [],
  };
}

/** Some entries of a round with the snapshots that publishing would write, stored nowhere. */
export async function reviewEntries(
  db: Handle,
  round: RoundContext,
  wanted: readonly RoundEntryRow[],
): Promise<ReviewEntry[]> {
  const names = await entryNames(db, { entryIds: wanted.map((entry) => entry.entryId) });
  const sessionIds = [...new Set(wanted.flatMap((entry) => entry.sessionId ?? []))];
  const sessions = await computedSessions(db, { sessionIds });
  const records = [...sessions.values()].map((session) => session.record);
  const makers = await makersOf(db, {
    revisionIds: wanted.map((entry) => entry.revisionId),
    baselineUnitIds: records.map((record) => record.baselineUnitId),
  });
  const distances = await microphoneDistances(db, { benchVersionIds: records.map((each) => each.benchVersionId) });
  return wanted
    .map((entry): ReviewEntry => {
      const session = sessions.get(entry.sessionId ?? "");
      const whyNone = whyNoFigures(session, entry.entryId);
      const microphoneDistanceMm = (session && distances.get(session.record.benchVersionId)) ?? Number.NaN;
      return {
        entryId: entry.entryId,
        designName: names.get(entry.entryId)?.designName ?? "",
        letter: names.get(entry.entryId)?.letter ?? "",
        state: entry.state,
        sessionId: entry.sessionId,
        snapshot:
          session && whyNone === null
            ? buildSnapshot(session, {
                round,
                entry,
                microphoneDistanceMm,
                makers: makers(entry.revisionId, session.record.baselineUnitId),
              })
            : null,
        whyNone,
      };
    })
    .sort((a, b) => a.designName.localeCompare(b.designName, "en") || a.letter.localeCompare(b.letter, "en"));
}

function whyNoFigures(session: ComputedSession | undefined, entryId: string): string | null {
  if (!session) return "no run of it is done yet";
  if (!session.figures.baseline) return "no run of the session's baseline has figures yet";
  const own = session.figures.entries.some(({ subject }) => subject.entryId === entryId);
  return own ? null : "none of its runs gives a figure yet";
}

/** The round scored by the season's rule and by the plain sum, with few draws. */
async function dryStandings(db: Handle, round: RoundContext, entries: readonly ReviewEntry[]): Promise<DryStanding[]> {
  const scored = entries.flatMap(({ entryId, sessionId, snapshot }) =>
    sessionId && snapshot ? [{ entryId, sessionId }] : [],
  );
  if (scored.length === 0) return [];
  const season: RuleVersion = { id: round.ruleVersionId, kind: round.ruleKind, parameters: round.ruleParameters };
  const naive = await newestRuleVersion(db, { kind: "plain-sum" });
  const rules = naive && naive.id !== season.id ? [season, naive] : [season];
  return Promise.all(
    rules.map(async (rule) => {
      const input = await standingInput(db, {
        ...round,
        entries: scored,
        rule,
        asOf: new Date(0),
        draws: dryDraws,
        seed: 1,
      });
      return { ruleKind: rule.kind, draws: dryDraws, rows: standingRows(input) };
    }),
  );
}

function changeWords(row: ChangeRow): string {
  const where = row.setSpeed === null ? "of the session" : `at ${row.setSpeed}`;
  if (row.kind === "superseded") {
    const quantity = (row.quantity ?? "").replaceAll("_", " ");
    return `${quantity} ${where}: ${row.was} ${row.unit} became ${row.value} ${row.unit}. ${row.reason ?? ""}`.trim();
  }
  if (row.kind === "readings") return `${row.count} new readings.`;
  return row.kind === "added" ? "Added to the round." : `Taken out of the round: ${row.reason}`;
}
