import { appDb } from "@/db/client/handles";
import { planningProtocol } from "@/db/queries/bench-setup";
import { hostEntryRows } from "@/db/queries/host-entries";
import { hostRoundRows, hostSeasonRows, roundRecord } from "@/db/queries/host-seasons";
import { handlesOf } from "@/db/queries/people";
import { signingFacts, standingSignature } from "@/db/queries/review";
import type { BenchHours, HostRound } from "@/lib/contracts/seasons-admin";
import type { Actor } from "@/lib/domain/accounts/actor";
import { planBench } from "@/lib/domain/bench/planner";
import type { Protocol } from "@/lib/domain/bench/protocol";
import { ExpectedError } from "@/lib/domain/expected-error";
import { demand } from "../permission";
import { hostEntryView } from "./read-entries";

/** Length of a sitting that hours are planned with. */
const sittingHours = 10;

function hoursOf(protocol: Protocol | undefined, entries: number): BenchHours | null {
  const plan = protocol && planBench(protocol, entries, sittingHours);
  return plan ? { ...plan, entries, sessionHours: sittingHours } : null;
}

/** A round as its host runs it: entries, hours at the bench, loan, hour, moves; states and no figure. */
export async function readHostRound(actor: Actor, { roundId }: { roundId: string }): Promise<HostRound> {
  demand(actor, "round.plan");
  const db = appDb();
  const [row] = await hostRoundRows(db, { roundId });
  const record = row && (await roundRecord(db, { roundId }));
  const [season] = row ? await hostSeasonRows(db, { seasonId: row.seasonId }) : [];
  if (!row || !record || !season) throw new ExpectedError("not_found", "There is no such round.");
  const entries = await hostEntryRows(db, { roundId });
  const placeable = ["accepted", "printing", "on_the_bench"] as const;
  const waiting = await hostEntryRows(db, { seasonId: row.seasonId, states: placeable });
  const free = waiting.filter((entry) => entry.roundId === null);
  const protocol = await planningProtocol(db, season);
  const signature = row.state === "in_review" ? undefined : await standingSignature(db, { roundId });
  const handles = await handlesOf(db, { personIds: signature ? [signature.reviewerId] : [] });
  return {
    roundId,
    seasonId: row.seasonId,
    seasonNumber: season.number,
    number: row.number,
    title: row.title,
    state: row.state,
    publishAt: row.publishAt?.toISOString() ?? null,
    publishedAt: row.publishedAt?.toISOString() ?? null,
    lentTo: record.lentTo,
    signedBy: signature ? (handles.get(signature.reviewerId) ?? "former member") : null,
    signedSha256: signature?.signedSha256 ?? null,
    ownsEntry: (await signingFacts(db, { roundId, personId: actor.personId })).ownedInRound,
    entries: entries.map(hostEntryView),
    takenOut: record.takenOut.map((each) => ({ ...each, at: new Date(each.at).toISOString() })),
    free: free.map(hostEntryView),
    hours: hoursOf(protocol, entries.length),
    hoursWithFree: hoursOf(protocol, entries.length + free.length),
    moves: record.moves.map((each) => ({ ...each, at: new Date(each.at).toISOString() })),
  };
}
