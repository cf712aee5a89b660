import { appDb, publicDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import {
  studyChoices,
  studyDerivations,
  studyEntries,
  studyGeneration,
  type StudyScope,
} from "@/db/queries/shown/study";
import { keepStudyResult } from "@/db/queries/study-results";
import { studyParams, type StudyQuestion } from "@/lib/contracts/study-question";
import type { StudyEntry } from "@/lib/domain/study/study-entry";
import { study, type StudyResult } from "@/lib/domain/study/study";
import { seasonSlugs } from "./choices";

/** Goes up with every change of what a stored result holds or how it is worked out, so that old ones aren't read. */
const studyVersion = 1;

/** A stored answer with the seasons that it was asked of. */
export interface StudyFound {
  seasonSlugs: string[];
  result: StudyResult;
}

/** The key of a question's stored answer. */
export function studyKey(question: StudyQuestion): string {
  return `v${studyVersion}?${new URLSearchParams(studyParams(question)).toString()}`.slice(0, 400);
}

/** One state of the public for all that is read: what is committed meanwhile is in none of it. */
export function oneView<T>(work: (db: Handle) => Promise<T>): Promise<T> {
  return publicDb().transaction(work, { isolationLevel: "repeatable read", readOnly: true });
}

/** The public entries that a question asks of; empty for a season that isn't there. */
export async function entriesAsked(
  db: Handle,
  question: StudyQuestion,
): Promise<{ entries: StudyEntry[]; seasonSlugs: string[] }> {
  const seasons = seasonSlugs(question.season, await studyChoices(db));
  if (seasons === undefined) return { entries: [], seasonSlugs: [question.season] };
  const scope: StudyScope = { frames: question.frames, rotations: question.rotations, seasons };
  return { entries: await studyEntries(db, scope), seasonSlugs: seasons };
}

/** Works a question out from what is public now and keeps the answer. */
export async function computeStudy(question: StudyQuestion): Promise<StudyFound & { generation: number }> {
  const read = await oneView(async (db) => ({
    generation: await studyGeneration(db),
    ...(await entriesAsked(db, question)),
    derivations: await studyDerivations(db),
  }));
  const traits = [question.trait, question.by].filter((key) => key !== null);
  const result = study({ traits, outcome: question.figure }, read.entries, read.derivations);
  const found = { seasonSlugs: read.seasonSlugs, result };
  const { generation, entries } = read;
  await keepStudyResult(appDb(), { question: studyKey(question), generation, entries: entries.length, result: found });
  return { ...found, generation };
}
