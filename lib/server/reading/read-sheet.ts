import { publicDb } from "@/db/client/handles";
import {
  shownBaselineUnits,
  shownCorrections,
  shownDesign,
  shownEntriesOfDesign,
  shownPublications,
  shownQuestions,
  shownRevisions,
} from "@/db/queries/shown/sheet";
import { shownReadings, shownRuns } from "@/db/queries/shown/raw-runs";
import { shownSessionFiles } from "@/db/queries/shown/session-files";
import { snapshotSchema } from "@/lib/contracts/publication";
import { ExpectedError } from "@/lib/domain/expected-error";

/**
 * A design's public page: the newest entry (or the one asked for) with its frozen figures, traits, ranks and what came
 * after, and every other entry as a line of the history.
 *
 * @throws ExpectedError not_found for a design without anything public
 */
export async function readSheet({ slug, entryId }: { slug: string; entryId?: string }) {
  const db = publicDb();
  const design = await shownDesign(db, { slug });
  if (!design) throw new ExpectedError("not_found", "There is no public design at this address.");
  const history = await shownEntriesOfDesign(db, { designId: design.id });
  const current = history.find((entry) => entry.entryId === entryId) ?? history[0];
  if (!current) throw new ExpectedError("gone", "This design was withdrawn.");
  const entryIds = history.map((entry) => entry.entryId);
  const [publications, revisions, units, corrections, questions] = await Promise.all([
    shownPublications(db, { entryIds: [current.entryId] }),
    shownRevisions(db, { revisionIds: history.map((entry) => entry.revisionId) }),
    shownBaselineUnits(db, { unitIds: history.map((entry) => entry.baselineUnitId) }),
    shownCorrections(db, { entryIds }),
    shownQuestions(db, { entryIds }),
  ]);
  const publication = publications.find((each) => each.current);
  if (!publication) throw new Error(`the entry ${current.entryId} is public without a publication`);
  return {
    design,
    current,
    publication: { number: publication.number, sha256: publication.sha256, publishedAt: publication.publishedAt },
    older: publications
      .filter((each) => !each.current)
      .map(({ number, sha256, publishedAt }) => ({ number, sha256, publishedAt })),
    snapshot: snapshotSchema.parse(publication.snapshot),
    baselineUnit: units.find((unit) => unit.unitId === current.baselineUnitId) ?? null,
    units,
    revisions,
    history,
    corrections,
    questions,
  };
}
export type SheetAnswer = Awaited<ReturnType<typeof readSheet>>;

/** Every raw reading behind an entry's figures, run by run, the baseline's runs, the session's own checks, their files. */
export async function readRawRuns({ slug, entryId }: { slug: string; entryId?: string }) {
  const { current, snapshot } = await readSheet({ slug, entryId });
  const db = publicDb();
  const of = { sessionId: snapshot.sessionId };
  const [runs, baselineRuns] = await Promise.all([
    shownRuns(db, { ...of, entryId: current.entryId }),
    shownRuns(db, { ...of, baselineUnitId: snapshot.baselineUnitId }),
  ]);
  const runIds = [...runs, ...baselineRuns].map((run) => run.runId);
  const [readings, files] = await Promise.all([
    shownReadings(db, { runIds, ...of }),
    shownSessionFiles(db, { runIds, ...of }),
  ]);
  return { sessionId: snapshot.sessionId, runs, baselineRuns, readings, files };
}
export type RawRunsAnswer = Awaited<ReturnType<typeof readRawRuns>>;
