import { appDb, publicDb } from "@/db/client/handles";
import { namesOfEntries } from "@/db/queries/shown/entry-names";
import { storedStudy, studyChoices, studyGeneration } from "@/db/queries/shown/study";
import { keepStudyResult } from "@/db/queries/study-results";
import { parseStudyQuestion, type StudyQuestion } from "@/lib/contracts/study-question";
import { studyAnswerSchema, studyChoicesSchema, type StudyAnswer, type StudyChoices } from "@/lib/contracts/study";
import { outcomeKeys } from "@/lib/domain/study/outcomes";
import { log } from "../log";
import { choicesFrom } from "./choices";
import { oneView, studyKey, type StudyFound } from "./compute-study";
import { computeStudyInThread } from "./in-thread";

/** With more entries than this an answer from before the newest publication is shown while the new one is worked out. */
const waitUpTo = 5_000;

/** What this process is working out, so that a rush on a page works it out once. */
const underway = new Map<string, Promise<StudyFound & { generation: number }>>();

function workedOut(question: StudyQuestion): Promise<StudyFound & { generation: number }> {
  const key = studyKey(question);
  const known = underway.get(key);
  if (known) return known;
  const work = computeStudyInThread(question).finally(() => underway.delete(key));
  underway.set(key, work);
  return work;
}

/**
 * Answers a question from the stored aggregates; works them out first when there are none, or when what is public has
 * changed since. Over a great many entries the older answer is given meanwhile, and says so.
 */
export async function readStudy(question: StudyQuestion): Promise<StudyAnswer> {
  const db = publicDb();
  const [generation, stored] = await Promise.all([
    studyGeneration(db),
    storedStudy(db, { question: studyKey(question) }),
  ]);
  const fresh = stored !== undefined && stored.generation >= generation;
  if (stored && !fresh && stored.entries > waitUpTo)
    void workedOut(question).catch((error: unknown) => log().error({ err: error }, "a study could not be worked out"));
  const useStored = stored !== undefined && (fresh || stored.entries > waitUpTo);
  const found = useStored ? (stored.result as StudyFound) : await workedOut(question);
  const ids = [...new Set(found.result.pairs.flatMap(({ fromEntryId, toEntryId }) => [fromEntryId, toEntryId]))];
  const names = await namesOfEntries(db, { entryIds: ids });
  return studyAnswerSchema.parse({
    question,
    seasonSlugs: found.seasonSlugs,
    result: found.result,
    names: Object.fromEntries(
      names.map(({ entryId, slug, name, letter, seasonSlug }) => [entryId, { slug, name, letter, seasonSlug }]),
    ),
    current: fresh || !useStored,
    computedAt: (useStored ? stored.computedAt : new Date()).toISOString(),
  });
}

const choicesKey = "choices";

/** What the question's parts can be; stored like an answer, since it counts every public entry. */
export async function readStudyChoices(): Promise<StudyChoices> {
  const db = publicDb();
  const [generation, stored] = await Promise.all([studyGeneration(db), storedStudy(db, { question: choicesKey })]);
  if (stored && stored.generation >= generation) return studyChoicesSchema.parse(stored.result);
  const read = await oneView(async (view) => ({
    generation: await studyGeneration(view),
    counted: await studyChoices(view),
  }));
  const result = choicesFrom(read.counted);
  const entries = read.counted.reduce((total, { count }) => total + count, 0);
  await keepStudyResult(appDb(), { question: choicesKey, generation: read.generation, entries, result });
  return result;
}

/**
 * For the worker: works out anew what everybody is shown first (the choices; every trait, each figure), where the public
 * has changed since. Gives the number of answers that were worked out.
 */
export async function refreshStudies(): Promise<number> {
  await readStudyChoices();
  let refreshed = 0;
  for (const figure of outcomeKeys) {
    const question = { ...parseStudyQuestion(new URLSearchParams()), figure };
    const [generation, stored] = await Promise.all([
      studyGeneration(publicDb()),
      storedStudy(publicDb(), { question: studyKey(question) }),
    ]);
    if (stored && stored.generation >= generation) continue;
    await computeStudyInThread(question);
    refreshed++;
  }
  return refreshed;
}
