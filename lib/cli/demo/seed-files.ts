import { Readable } from "node:stream";
import type { Handle } from "@/db/client/connect";
import { sqlExecutor } from "@/db/client/executor";
import { attachFile, fileOfContent } from "@/db/queries/uploads";
import type { DemoBench } from "@/db/seeds/demo/seed-bench";
import { isShallow, toyFinStack, toyMesh } from "@/db/seeds/demo/toy-mesh";
import type { DemoDesign, DemoRevision } from "@/db/seeds/demo/world";
import { meshBounds, type Mesh } from "@/lib/science/geometry/mesh";
import { writeBinaryStl } from "@/lib/science/geometry/stl-write";
import { contentOf, keepContent } from "@/lib/server/uploads/content";
import { startJobs } from "@/lib/services/jobs/jobs";
import { requiredEnv } from "@/lib/env/env";

/** Designs of the demo whose revisions have a model file. */
const MODELS = 12;
const depthMm = (frameKey: string): number => Number(frameKey.split("x")[1] ?? 25);

/**
 * Gives some of the demo's designs a real model of their rotors and the bench a fin stack, before anything is sent in.
 * The worker reads and draws the models once it runs, as it does for everybody's.
 */
export async function seedFiles(
  db: Handle,
  designs: readonly DemoDesign[],
  revisions: Map<DemoRevision, string>,
  people: Map<string, string>,
  bench: DemoBench,
): Promise<void> {
  const chosen = designs
    .filter(({ revisions: all }) => all.every(({ fan, frameKey }) => isShallow(fan, depthMm(frameKey))))
    .slice(0, MODELS);
  const fileIds = new Set<string>();
  for (const design of chosen) {
    const owner = people.get(design.owner) ?? "";
    for (const revision of design.revisions) {
      const fileId = await keep(db, toyMesh(revision.fan), `${design.name} ${revision.letter}, invented`, owner);
      const name = `${design.slug}-${revision.letter.toLowerCase()}.stl`;
      await attachFile(db, { revisionId: revisions.get(revision) ?? "", fileId, role: "model", name });
      fileIds.add(fileId);
    }
  }
  const host = people.get("alderkeeper") ?? "";
  for (const [i, version] of bench.versions.entries()) {
    const fins = toyFinStack(i === 0 ? 46 : 52);
    const reach = meshBounds(fins);
    const fileId = await keep(db, fins, `Fin stack, bench version ${i + 1}, invented`, host);
    const note = "fins, without the pipes";
    await db("keep_out").insert({
      bench_version_id: version.id,
      name: "Fin stack",
      shape: "mesh",
      file_id: fileId,
      note,
      extent_min_mm: reach ? [...reach.min] : null,
      extent_max_mm: reach ? [...reach.max] : null,
    });
  }
  await askToRead(db, fileIds);
}

async function keep(db: Handle, mesh: Mesh, title: string, receivedFrom: string): Promise<string> {
  const bytes = Buffer.from(writeBinaryStl(mesh, title));
  const content = await contentOf(async () => Readable.from([bytes]), bytes.length);
  const storageKey = await keepContent(content);
  return fileOfContent(db, {
    sha256: content.sha256,
    bytes: content.bytes,
    kind: content.kind,
    storageKey,
    receivedFrom,
  });
}

async function askToRead(db: Handle, fileIds: ReadonlySet<string>): Promise<void> {
  const jobs = await startJobs({
    databaseUrl: requiredEnv("DATABASE_URL"),
    works: false,
    onError: (error) => process.stderr.write(`job queue: ${error.message}\n`),
  });
  try {
    for (const fileId of fileIds)
      await jobs.send("model-read", { fileId }, { onceBy: fileId, within: sqlExecutor(db) });
  } finally {
    await jobs.stop();
  }
}
