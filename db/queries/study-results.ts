import type { Handle } from "../client/connect";

/** Questions kept at most; addresses can ask any number, and the least recently answered goes. */
export const resultsKept = 400;

/** Keeps an answer, unless one of a newer state of the public stands already; and drops the oldest beyond the limit. */
export async function keepStudyResult(
  db: Handle,
  kept: { question: string; generation: number; entries: number; result: unknown },
): Promise<void> {
  const { question, generation, entries, result } = kept;
  await db("study_result")
    .insert({ question, generation, entries, result: JSON.stringify(result) })
    .onConflict("question")
    .merge({ generation, entries, result: JSON.stringify(result), computed_at: db.fn.now() })
    .where("study_result.generation", "<=", generation);
  await db("study_result")
    .whereIn(
      "question",
      db("study_result").select("question").orderBy("computed_at", "desc").orderBy("question").offset(resultsKept),
    )
    .delete();
}
