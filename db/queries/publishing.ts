import type { Handle } from "../client/connect";

export interface PublicationInsert {
  entryId: string;
  roundId: string;
  snapshot: unknown;
  sha256: string;
  methodVersion: number;
  sessionIds: readonly string[];
  at: Date;
}

/** Adds the next publication of an entry and what it reaches. @returns its id and number */
export async function insertPublication(
  db: Handle,
  publication: PublicationInsert,
): Promise<{ id: string; number: number }> {
  const last = await db("publication")
    .where({ entry_id: publication.entryId })
    .max<{ max: number | null }>("number as max")
    .first();
  const number = (last?.max ?? 0) + 1;
  const [made]: { id: string }[] = await db("publication")
    .insert({
      entry_id: publication.entryId,
      number,
      round_id: publication.roundId,
      snapshot: JSON.stringify(publication.snapshot),
      schema_version: 1,
      sha256: publication.sha256,
      method_version: publication.methodVersion,
      published_at: publication.at,
    })
    .returning("id");
  if (!made) throw new Error("no publication came back");
  await db("publication_session").insert(
    publication.sessionIds.map((sessionId) => ({
      publication_id: made.id,
      entry_id: publication.entryId,
      session_id: sessionId,
    })),
  );
  return { id: made.id, number };
}

/** Traits as the read model shows them, by revision. */
export interface ListedTraits {
  stages: number;
  counter_rotating: boolean;
  blades_first: number;
  blades_second: number | null;
  hand_first: string;
  inlet_stack: string;
  inlet_stack_mm: number;
  spacer_mm: number;
  struts: number;
  shroud: boolean;
  frame_key: string;
  material: string;
  licence: string;
  tip_gap_mm: number | null;
  solidity_mid: number | null;
  pitch_mid_deg: number | null;
  mass_g: number | null;
  print_time_min: number | null;
}

export async function listedTraits(
  db: Handle,
  { revisionIds }: { revisionIds: readonly string[] },
): Promise<Map<string, ListedTraits>> {
  const { rows }: { rows: (ListedTraits & { revision_id: string })[] } = await db.raw(
    `select t.revision_id, t.stages, t.counter_rotating, a.blades as blades_first, b.blades as blades_second, a.hand as hand_first,
       t.inlet_stack, t.inlet_stack_mm, t.spacer_mm, t.struts, bool_or(c.shroud) as shroud, f.key as frame_key, t.material, r.licence,
       t.tip_gap_mm, a.solidity_mid, a.pitch_mid_deg, round(sum(c.mass_g)::numeric, 6)::float8 as mass_g, t.print_time_min
     from revision_trait t join revision r on r.id = t.revision_id join frame f on f.id = t.frame_id
       join rotor a on a.revision_id = t.revision_id and a.position = 1
       left join rotor b on b.revision_id = t.revision_id and b.position = 2
       join rotor c on c.revision_id = t.revision_id
     where t.revision_id = any (:revisionIds)
     group by t.revision_id, r.id, f.id, a.revision_id, a.position, b.revision_id, b.position`,
    { revisionIds: [...revisionIds] },
  );
  return new Map(rows.map(({ revision_id, ...traits }) => [revision_id, traits]));
}

/** Makes an entry visible, or moves what is visible of it, by writing its row of the read model. */
export async function upsertPublishedEntry(
  db: Handle,
  row: Record<string, unknown> & { entry_id: string },
): Promise<void> {
  const { first_published_at: _first, entry_id: _id, ...changing } = row;
  await db("published_entry").insert(row).onConflict("entry_id").merge(Object.keys(changing));
}

/** Writes ranks into the read model: of a round for its entries, or of a season for all of its entries. */
export async function writeRanks(
  db: Handle,
  {
    scope,
    rows,
  }: {
    scope: "round" | "season";
    rows: readonly {
      entryId: string;
      score: number | null;
      uScore: number | null;
      rank: number | null;
      rankLow: number | null;
      rankHigh: number | null;
      whyNotRanked: string | null;
    }[];
  },
): Promise<void> {
  const of = rows.filter((row) => row.rank !== null).length;
  const values = JSON.stringify(rows.map((row) => ({ ...row, of })));
  await db.raw(
    `update published_entry p set ${scope}_rank = v.rank, ${scope}_rank_low = v."rankLow", ${scope}_rank_high = v."rankHigh",
       ${scope}_of = v.of, score = v.score, u_score = v."uScore", why_not_ranked = v."whyNotRanked"
     from jsonb_to_recordset(:values::jsonb) as v("entryId" uuid, score double precision, "uScore" double precision,
       rank integer, "rankLow" integer, "rankHigh" integer, of integer, "whyNotRanked" text)
     where p.entry_id = v."entryId"`,
    { values },
  );
}

/** The bench version's microphone distance from the inlet-side mounting flange, mm. */
export async function microphoneDistances(
  db: Handle,
  { benchVersionIds }: { benchVersionIds: readonly string[] },
): Promise<Map<string, number>> {
  const rows = await db("bench_version")
    .whereIn("id", [...benchVersionIds])
    .select<{ id: string; microphone_distance_mm: number }[]>("id", "microphone_distance_mm");
  return new Map(rows.map((row) => [row.id, row.microphone_distance_mm]));
}

/** Keeps an event and one delivery for each consumer, in the transaction of what it tells of. */
export async function insertEvent(
  db: Handle,
  { kind, subject, consumers, at }: { kind: string; subject: unknown; consumers: readonly string[]; at: Date },
): Promise<void> {
  const [made]: { id: number }[] = await db("event")
    .insert({ kind, subject: JSON.stringify(subject), at })
    .returning("id");
  if (!made) throw new Error("no event came back");
  if (consumers.length > 0) {
    await db("delivery").insert(consumers.map((consumer) => ({ event_id: made.id, consumer })));
  }
}
