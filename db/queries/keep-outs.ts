import type { Handle } from "../client/connect";

export interface KeepOutRow {
  id: string;
  name: string;
  shape: "box" | "mesh";
  note: string;
  minMm: number[] | null;
  maxMm: number[] | null;
}

/** Keep-out solids of a bench version by name; a mesh with how far it reaches. Cooler coordinates, mm. */
export async function keepOutsOf(db: Handle, { benchVersionId }: { benchVersionId: string }): Promise<KeepOutRow[]> {
  return db("keep_out")
    .where({ bench_version_id: benchVersionId })
    .orderBy("name")
    .select<KeepOutRow[]>(
      "id",
      "name",
      "shape",
      "note",
      db.raw('coalesce(min_mm, extent_min_mm) as "minMm"'),
      db.raw('coalesce(max_mm, extent_max_mm) as "maxMm"'),
    );
}

/** What stands on a bench version's geometry. */
export interface BenchVersionUse {
  /** Titles of seasons that were opened on it, the oldest first. */
  seasons: string[];
  /** Whether figures that were measured on it are published. */
  published: boolean;
}

/** What stands on a bench version; undefined when there is none. With `lock` its row is held to the transaction's end. */
export async function benchVersionUse(
  db: Handle,
  { benchVersionId, lock = false }: { benchVersionId: string; lock?: boolean },
): Promise<BenchVersionUse | undefined> {
  const held = await db("bench_version")
    .where({ id: benchVersionId })
    .modify((query) => void (lock && query.forUpdate()))
    .first<{ id: string } | undefined>("id");
  if (!held) return undefined;
  const { rows }: { rows: BenchVersionUse[] } = await db.raw(
    `select array(select s.title from season s join season_bench b on b.season_id = s.id
         where b.bench_version_id = :benchVersionId and s.opened_at is not null order by s.number) as seasons,
       exists (select 1 from session s join publication_session p on p.session_id = s.id
         where s.bench_version_id = :benchVersionId) as published`,
    { benchVersionId },
  );
  return rows[0];
}

export type NewKeepOut = { benchVersionId: string; name: string; note: string } & (
  | { shape: "box"; minMm: number[]; maxMm: number[] }
  | { shape: "mesh"; fileId: string; extentMinMm: number[]; extentMaxMm: number[] }
);

export async function insertKeepOut(db: Handle, solid: NewKeepOut): Promise<string> {
  const { benchVersionId, name, note, shape } = solid;
  const [made]: { id: string }[] = await db("keep_out")
    .insert({
      bench_version_id: benchVersionId,
      name,
      note,
      shape,
      ...(solid.shape === "box"
        ? { min_mm: solid.minMm, max_mm: solid.maxMm }
        : { file_id: solid.fileId, extent_min_mm: solid.extentMinMm, extent_max_mm: solid.extentMaxMm }),
    })
    .returning("id");
  if (!made) throw new Error("no keep-out came back");
  return made.id;
}

/** A solid with the bench version that it stands on. */
export async function keepOutHead(
  db: Handle,
  { keepOutId }: { keepOutId: string },
): Promise<{ benchVersionId: string; name: string } | undefined> {
  return db("keep_out").where({ id: keepOutId }).first({ benchVersionId: "bench_version_id", name: "name" });
}

export async function deleteKeepOut(db: Handle, { keepOutId }: { keepOutId: string }): Promise<void> {
  await db("keep_out").where({ id: keepOutId }).delete();
}

/** Gives a new bench version the solids of the one before it; meshes whose file was taken down stay behind. */
export async function carryKeepOuts(
  db: Handle,
  { benchId, toVersionId }: { benchId: string; toVersionId: string },
): Promise<void> {
  await db.raw(
    `insert into keep_out (bench_version_id, name, shape, min_mm, max_mm, file_id, note, extent_min_mm, extent_max_mm)
     select :toVersionId, k.name, k.shape, k.min_mm, k.max_mm, k.file_id, k.note, k.extent_min_mm, k.extent_max_mm
     from keep_out k left join file f on f.id = k.file_id
     where k.bench_version_id = (
       select id from bench_version where bench_id = :benchId and id <> :toVersionId order by number desc limit 1)
       and f.state is distinct from 'taken_down'`,
    { benchId, toVersionId },
  );
}
