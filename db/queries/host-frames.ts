import type { Handle } from "../client/connect";

export interface FrameRow {
  id: string;
  key: string;
  classMm: number;
  outerMm: number;
  holeSpacingMm: number;
  holeDiameterMm: number;
  boreMm: number;
  depthMm: number;
  toleranceMm: number;
}

/** A frame with what stands on its figures: titles of seasons that opened with it, and revisions that were sent in. */
export interface FrameWithUse extends FrameRow {
  seasons: string[];
  sentIn: number;
}

/** Every frame with its use, the smallest first; with an id that one alone. */
export async function framesWithUse(db: Handle, { frameId }: { frameId?: string } = {}): Promise<FrameWithUse[]> {
  const { rows }: { rows: FrameWithUse[] } = await db.raw(
    `select f.id, f.key, f.class_mm as "classMm", f.outer_mm as "outerMm", f.hole_spacing_mm as "holeSpacingMm",
       f.hole_diameter_mm as "holeDiameterMm", f.bore_mm as "boreMm", f.depth_mm as "depthMm", f.tolerance_mm as "toleranceMm",
       array(select s.title from season s join season_frame x on x.season_id = s.id
         where x.frame_id = f.id and s.opened_at is not null order by s.number) as seasons,
       (select count(*)::int from revision r join revision_trait t on t.revision_id = r.id
         where t.frame_id = f.id and r.sent_in_at is not null) as "sentIn"
     from frame f where :frameId::uuid is null or f.id = :frameId::uuid order by f.outer_mm, f.depth_mm, f.key`,
    { frameId: frameId ?? null },
  );
  return rows;
}

/** Holds a frame's row until the transaction ends. @returns whether there is one */
export async function holdFrame(db: Handle, { frameId }: { frameId: string }): Promise<boolean> {
  return (await db("frame").where({ id: frameId }).forUpdate().first("id")) !== undefined;
}

/** Whether another frame has this name. */
export async function frameKeyTaken(db: Handle, { key, besides }: { key: string; besides?: string }): Promise<boolean> {
  const row = await db("frame").where({ key }).first<{ id: string } | undefined>("id");
  return row !== undefined && row.id !== besides;
}

const columns = (frame: Omit<FrameRow, "id">) => ({
  key: frame.key,
  class_mm: frame.classMm,
  outer_mm: frame.outerMm,
  hole_spacing_mm: frame.holeSpacingMm,
  hole_diameter_mm: frame.holeDiameterMm,
  bore_mm: frame.boreMm,
  depth_mm: frame.depthMm,
  tolerance_mm: frame.toleranceMm,
});

export async function insertFrame(db: Handle, frame: Omit<FrameRow, "id">): Promise<string> {
  const [made]: { id: string }[] = await db("frame").insert(columns(frame)).returning("id");
  if (!made) throw new Error("no frame came back");
  return made.id;
}

/** Changes a frame's figures; the database refuses it for one that is in use. */
export async function updateFrame(db: Handle, { id, ...frame }: FrameRow): Promise<void> {
  await db("frame").where({ id }).update(columns(frame));
}
