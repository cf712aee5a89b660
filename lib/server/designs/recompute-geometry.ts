import type { Handle } from "@/db/client/connect";
import { insertMeshDrawing, insertMeshReading, modelFiles, type StoredReading } from "@/db/queries/mesh-readings";
import { meshReadingResult } from "@/lib/contracts/mesh-reading";
import { readingChanges } from "@/lib/domain/designs/reading-changes";
import { READER_VERSION } from "@/lib/science/geometry/reader-version";
import { Refusal } from "@/lib/science/refusal";
import { asLocalFile } from "@/lib/services/quarantine/quarantine";
import { storage } from "@/lib/services/storage/from-env";
import { readMeshFile } from "./read-mesh";

export interface GeometryReport {
  /** Files that were read for the first time, or by this version for the first time. */
  stored: number;
  same: number;
  /** One line a file whose reading changed, with what did. */
  differing: string[];
  /** One line a file that could not be read. */
  refused: string[];
}

const changesTold = 12;

/**
 * Reads every stored model again and compares it with its newest reading. A reading by another version of the reader is
 * kept beside the earlier ones, which stay; what a revision's traits hold doesn't change by it, a person confirms them.
 */
export async function recomputeGeometry(db: Handle, version = READER_VERSION): Promise<GeometryReport> {
  const report: GeometryReport = { stored: 0, same: 0, differing: [], refused: [] };
  let afterId: string | null = null;
  for (;;) {
    const files: StoredReading[] = await modelFiles(db, { afterId });
    for (const file of files) await readAgain(db, file, version, report);
    const last = files.at(-1);
    if (!last) return report;
    afterId = last.fileId;
  }
}

async function readAgain(db: Handle, file: StoredReading, version: string, report: GeometryReport): Promise<void> {
  const { fileId, storageKey, readerVersion } = file;
  try {
    const { body } = await storage().get(storageKey);
    const mmPerUnit = saidUnit(file.result);
    const { result, drawing } = await asLocalFile(body, (path) => readMeshFile(path, { mmPerUnit }));
    const changes = readerVersion === null ? [] : readingChanges(file.result, JSON.parse(JSON.stringify(result)));
    if (readerVersion !== version) {
      await insertMeshReading(db, { fileId, readerVersion: version, result });
      report.stored += 1;
    }
    if (drawing) await insertMeshDrawing(db, { fileId, readerVersion: version, drawing });
    if (changes.length === 0) report.same += 1;
    else {
      const told = changes
        .slice(0, changesTold)
        .map(({ path, before, after }) => `${path} ${said(before)} → ${said(after)}`);
      const more = changes.length > changesTold ? [`and ${changes.length - changesTold} more`] : [];
      report.differing.push(`file ${fileId}, version ${readerVersion} → ${version}: ${[...told, ...more].join("; ")}`);
    }
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    report.refused.push(`file ${fileId}: ${error.message}`);
  }
}

/** The unit that a person named when the file was first read. */
function saidUnit(stored: unknown): number | undefined {
  const before = meshReadingResult.safeParse(stored);
  return before.success && before.data.unit.from === "said" ? before.data.unit.mmPerUnit : undefined;
}

const said = (value: unknown): string => (value === undefined ? "nothing" : JSON.stringify(value));
