import { appDb } from "@/db/client/handles";
import {
  hostRoundRows,
  hostSeasonRows,
  insertSeason,
  seasonHead,
  setSeasonParts,
  stampSeason,
  updateSeason,
  type HostRoundRow,
  type HostSeasonRow,
} from "@/db/queries/host-seasons";
import { seasonMisfits } from "@/db/queries/host-benches";
import type { Handle } from "@/db/client/connect";
import type { HostSeason, NewSeason, SeasonChange } from "@/lib/contracts/seasons-admin";
import type { Actor } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { unqualifiedBenches } from "../baselines/settle-session";
import { demand } from "../permission";

const iso = (moment: Date | null): string | null => moment?.toISOString() ?? null;

function view(row: HostSeasonRow, rounds: readonly HostRoundRow[]): HostSeason {
  return {
    ...row,
    openedAt: iso(row.openedAt),
    closedAt: iso(row.closedAt),
    frozenAt: iso(row.frozenAt),
    rounds: rounds
      .filter((round) => round.seasonId === row.seasonId)
      .map(({ seasonId: _seasonId, publishAt, publishedAt, ...round }) => ({
        ...round,
        publishAt: iso(publishAt),
        publishedAt: iso(publishedAt),
      })),
  };
}

/** Seasons with their rounds for the host, the newest first. */
export async function readHostSeasons(actor: Actor): Promise<{ items: HostSeason[] }> {
  demand(actor, "season.manage");
  const [rows, rounds] = await Promise.all([hostSeasonRows(appDb()), hostRoundRows(appDb())]);
  return { items: rows.map((row) => view(row, rounds)) };
}

export async function readHostSeason(actor: Actor, { seasonId }: { seasonId: string }): Promise<HostSeason> {
  demand(actor, "season.manage");
  const [row] = await hostSeasonRows(appDb(), { seasonId });
  if (!row) throw new ExpectedError("not_found", "There is no such season.");
  return view(row, await hostRoundRows(appDb(), { seasonId }));
}

/** @throws ExpectedError malformed where the parts don't fit together */
async function checkParts(tx: Handle, season: SeasonChange): Promise<void> {
  if (!season.levelsDba.includes(season.headlineDba)) {
    throw new ExpectedError("malformed", "The headline level is one of the declared levels.", [
      { path: "headlineDba", message: `is none of ${season.levelsDba.join(", ")}` },
    ]);
  }
  const misfits = await seasonMisfits(tx, season);
  if (misfits.length > 0) throw new ExpectedError("malformed", "The season's parts don't fit together.", misfits);
}

/** Makes a season that is not open yet. */
export async function makeSeason(asked: Asked, season: NewSeason): Promise<{ id: string }> {
  demand(asked.actor, "season.manage");
  return appDb().transaction(async (tx) => {
    await checkParts(tx, season);
    const id = await insertSeason(tx, season);
    await setSeasonParts(tx, { seasonId: id, season });
    await note(tx, asked, { action: "season.make", subjectKind: "season", subjectId: id, after: season });
    return { id };
  });
}

/**
 * Changes a season. After its first reading protocol, rule, levels and budget stand; only words, frames and lengths
 * change then.
 * @throws ExpectedError moved_on naming what is frozen
 */
export async function changeSeason(
  asked: Asked,
  { seasonId, season }: { seasonId: string; season: SeasonChange },
): Promise<void> {
  demand(asked.actor, "season.manage");
  await appDb().transaction(async (tx) => {
    const head = await seasonHead(tx, { seasonId, lock: true });
    const [before] = await hostSeasonRows(tx, { seasonId });
    if (!head || !before) throw new ExpectedError("not_found", "There is no such season.");
    await checkParts(tx, season);
    const frozen = head.frozenAt ? frozenParts(before, season) : [];
    if (frozen.length > 0) {
      throw new ExpectedError(
        "moved_on",
        `The season had its first reading: ${frozen.join(", ")} can't be changed any more.`,
      );
    }
    await updateSeason(tx, { seasonId, season });
    await setSeasonParts(tx, { seasonId, season, framesOnly: head.frozenAt !== null });
    await note(tx, asked, {
      action: "season.change",
      subjectKind: "season",
      subjectId: seasonId,
      before,
      after: season,
    });
  });
}

function frozenParts(before: HostSeasonRow, season: SeasonChange): string[] {
  const parts: [string, boolean][] = [
    ["protocol", before.protocolVersionId === season.protocolVersionId],
    ["scoring rule", before.scoringRuleVersionId === season.scoringRuleVersionId],
    ["declared levels", before.levelsDba.join() === season.levelsDba.join()],
    ["headline level", before.headlineDba === season.headlineDba],
    ["bench version", before.benchVersionId === season.benchVersionId],
    ["budget", before.budgetVersionId === season.budgetVersionId],
    ["baseline unit", before.baselineUnitId === season.baselineUnitId],
  ];
  return parts.flatMap(([name, same]) => (same ? [] : [name]));
}

/**
 * Opens a season, which is public from then on, or closes it. It doesn't open on a bench that isn't qualified at every
 * set speed of its protocol.
 */
export async function moveSeason(
  asked: Asked,
  { seasonId, to, at }: { seasonId: string; to: "opened" | "closed"; at: Date },
): Promise<void> {
  demand(asked.actor, "season.manage");
  await appDb().transaction(async (tx) => {
    const season = await seasonHead(tx, { seasonId, lock: true });
    if (!season) throw new ExpectedError("not_found", "There is no such season.");
    if (to === "opened" && season.openedAt) throw new ExpectedError("moved_on", "The season is open already.");
    if (to === "closed" && !season.openedAt) throw new ExpectedError("moved_on", "The season was never opened.");
    if (to === "closed" && season.closedAt) throw new ExpectedError("moved_on", "The season is closed already.");
    const unqualified = to === "opened" ? await unqualifiedBenches(tx, { seasonId }) : [];
    if (unqualified.length > 0) throw new ExpectedError("moved_on", unqualified.join(" "));
    await stampSeason(tx, { seasonId, what: to, at });
    await note(tx, asked, { action: `season.${to}`, subjectKind: "season", subjectId: seasonId });
  });
}
