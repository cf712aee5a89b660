import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { addToRound, hostEntryRows, takeOutRow } from "@/db/queries/host-entries";
import { insertRound, seasonHead, setLoan } from "@/db/queries/host-seasons";
import { personByHandle } from "@/db/queries/people";
import { signingFacts } from "@/db/queries/review";
import { roundContext } from "@/db/queries/round-context";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";
import { returnSignedRound } from "../review/return-to-review";

/** States in which an entry can be put into a round that is planned or being measured. */
const placeable = ["accepted", "printing", "on_the_bench"];

/** Plans the next round of a season, with entries of it where some are named. */
export async function planRound(
  asked: Asked,
  { seasonId, title, entryIds }: { seasonId: string; title: string; entryIds: readonly string[] },
): Promise<{ id: string }> {
  demand(asked.actor, "round.plan");
  return appDb().transaction(async (tx) => {
    const season = await seasonHead(tx, { seasonId, lock: true });
    if (!season) throw new ExpectedError("not_found", "There is no such season.");
    if (!season.openedAt || season.closedAt) {
      throw new ExpectedError("moved_on", "Rounds are planned in a season that is open.");
    }
    const id = await insertRound(tx, { seasonId, title });
    if (entryIds.length > 0) await place(tx, { roundId: id, seasonId, entryIds });
    await note(tx, asked, { action: "round.plan", subjectKind: "round", subjectId: id, after: { seasonId, entryIds } });
    return { id };
  });
}

/** Puts accepted entries into a round that is planned or being measured. */
export async function addRoundEntries(
  asked: Asked,
  { roundId, entryIds }: { roundId: string; entryIds: readonly string[] },
): Promise<void> {
  demand(asked.actor, "round.plan");
  await appDb().transaction(async (tx) => {
    const round = await roundContext(tx, { roundId, lock: true });
    if (round.state !== "planned" && round.state !== "measuring") {
      const state = round.state.replaceAll("_", " ");
      throw new ExpectedError(
        "moved_on",
        `The round is ${state}: entries go into one that is planned or being measured.`,
      );
    }
    await place(tx, { roundId, seasonId: round.seasonId, entryIds });
    await note(tx, asked, { action: "round.add", subjectKind: "round", subjectId: roundId, after: { entryIds } });
  });
}

async function place(
  tx: Handle,
  { roundId, seasonId, entryIds }: { roundId: string; seasonId: string; entryIds: readonly string[] },
): Promise<void> {
  const rows = await hostEntryRows(tx, { seasonId });
  const fields = entryIds.flatMap((entryId, i) => {
    const row = rows.find((each) => each.entryId === entryId);
    const why = !row
      ? "is no entry of this season"
      : row.roundId !== null
        ? "stands in a round already"
        : placeable.includes(row.state)
          ? undefined
          : `is ${row.state.replaceAll("_", " ")}`;
    return why ? [{ path: `entryIds[${i}]`, message: why }] : [];
  });
  if (fields.length > 0) {
    throw new ExpectedError("malformed", `Some entries can't go into the round: ${fields[0]?.message}.`, fields);
  }
  await addToRound(tx, { roundId, entryIds: [...new Set(entryIds)] });
}

/** Takes an entry out of a round before its hour; a signed round goes back to review. */
export async function takeOutEntry(
  asked: Asked,
  { roundId, entryId, reason, at }: { roundId: string; entryId: string; reason: string; at: Date },
): Promise<void> {
  demand(asked.actor, "round.plan");
  await appDb().transaction(async (tx) => {
    const state = await returnSignedRound(tx, { roundId, reason: `An entry was taken out: ${reason}`, at });
    if (state === undefined) throw new ExpectedError("not_found", "There is no such round.");
    if (state === "published") {
      throw new ExpectedError("moved_on", "The round is published: an entry of it is withdrawn, not taken out.");
    }
    if (!(await takeOutRow(tx, { roundId, entryId, reason, at }))) {
      throw new ExpectedError("moved_on", "The entry doesn't stand in this round.");
    }
    await note(tx, asked, {
      action: "round.take_out",
      subjectKind: "round",
      subjectId: roundId,
      after: { entryId, reason },
    });
  });
}

/** Lends the review of a round to one member, who then sees its figures and may sign it; null ends the loan. */
export async function lendRound(
  asked: Asked,
  { roundId, handle, at }: { roundId: string; handle: string | null; at: Date },
): Promise<void> {
  const { actor } = asked;
  demand(actor, "round.lend");
  await appDb().transaction(async (tx) => {
    const round = await roundContext(tx, { roundId, lock: true });
    if (round.state === "published") throw new ExpectedError("moved_on", "The round is published.");
    const personId = handle === null ? null : await borrower(tx, roundId, handle);
    await setLoan(tx, { roundId, personId, byPerson: actor.personId, at });
    await note(tx, asked, { action: "round.lend", subjectKind: "round", subjectId: roundId, after: { personId } });
  });
}

async function borrower(tx: Handle, roundId: string, handle: string): Promise<string> {
  const refuse = (message: string) =>
    new ExpectedError("malformed", `${handle} ${message}.`, [{ path: "handle", message }]);
  const person = await personByHandle(tx, { handle });
  if (!person || person.closedAt) throw refuse("is nobody here");
  if (person.role !== "member") throw refuse("reviews without a loan");
  const facts = await signingFacts(tx, { roundId, personId: person.personId });
  if (facts.ownedInRound) throw refuse("owned an entry of this round");
  if (facts.tookReading) throw refuse("took a reading of this round");
  return person.personId;
}
