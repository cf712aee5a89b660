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

/** What a question asks of, and the seasons it comes to; no scope for a season that isn't there, which nothing fits. */
export async function scopeOf(
  db: Handle,
  question: StudyQuestion,
): Promise<{ scope: StudyScope | undefined; seasonSlugs: string[] }> {
  const seasons = seasonSlugs(question.season, await studyChoices(db));
  if (seasons === undefined) return { scope: undefined, seasonSlugs: [question.season] };
  return { scope: { frames: question.frames, rotations: question.rotations, seasons }, seasonSlugs: seasons };
}

/** Works a question out from what is public now and keeps the answer. */
export async function computeStudy(question: StudyQuestion): Promise<StudyFound & { generation: number }> {
  const read = await oneView(async (db) => {
    const asked = await scopeOf(db, question);
    return {
      generation: await studyGeneration(db),
      seasonSlugs: asked.seasonSlugs,
      entries: asked.scope ? await studyEntries(db, asked.scope) : [],
      derivations: await studyDerivations(db),
    };
  });
  const traits = [question.trait, question.by].filter((key) => key !== null);
  const result = study({ traits, outcome: question.figure }, read.entries, read.derivations);
  const found = { seasonSlugs: read.seasonSlugs, result };
  const { generation, entries } = read;
  await keepStudyResult(appDb(), { question: studyKey(question), generation, entries: entries.length, result: found });
  return { ...found, generation };
}
