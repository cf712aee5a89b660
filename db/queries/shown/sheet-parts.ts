import type { Handle } from "../../client/connect";
import { protocolColumns, type ProtocolColumns } from "../protocol-columns";

export interface WithdrawalRow {
  entryId: string;
  reason: string;
  at: Date;
  name: string;
  letter: string;
}

/** Stubs of a design's withdrawn entries, the newest first; empty for none. */
export async function shownWithdrawals(db: Handle, { slug }: { slug: string }): Promise<WithdrawalRow[]> {
  return db("shown.withdrawal")
    .where({ design_slug: slug })
    .orderBy("at", "desc")
    .select({ entryId: "entry_id", reason: "reason", at: "at", name: "design_name", letter: "revision_letter" });
}

/** Whether all that was ever public of the design at an address was withdrawn, so that only a stub is left. */
export async function nothingLeftOf(db: Handle, { slug }: { slug: string }): Promise<boolean> {
  const { rows }: { rows: { gone: boolean }[] } = await db.raw(
    `select exists (select 1 from shown.withdrawal where design_slug = :slug)
       and not exists (select 1 from shown.entry where design_slug = :slug) as gone`,
    { slug },
  );
  return rows[0]?.gone ?? false;
}

export interface ShownProtocolRow extends ProtocolColumns {
  name: string;
  version: number;
}

/** A protocol version that a season uses, by id. */
export async function shownProtocol(
  db: Handle,
  { protocolVersionId }: { protocolVersionId: string },
): Promise<ShownProtocolRow | undefined> {
  return db("shown.protocol_version")
    .where({ id: protocolVersionId })
    .first({
      name: "protocol_name",
      version: "number",
      ...protocolColumns,
    });
}

export interface EntryRankRow {
  roundId: string | null;
  number: number;
  asOf: Date;
  rank: number | null;
  low: number | null;
  high: number | null;
  whyNotRanked: string | null;
  of: number;
}

/** An entry's places in all standings of its season under one rule, the oldest first; `of` counts those ranked. */
export async function shownRanksOfEntry(
  db: Handle,
  { entryId, seasonId, ruleVersionId }: { entryId: string; seasonId: string; ruleVersionId: string },
): Promise<EntryRankRow[]> {
  return db("shown.standing_row as r")
    .join("shown.standing as t", "t.id", "r.standing_id")
    .where({ "r.entry_id": entryId, "t.season_id": seasonId, "t.rule_version_id": ruleVersionId })
    .orderBy("t.number")
    .select({
      roundId: "t.round_id",
      number: "t.number",
      asOf: "t.as_of",
      rank: "r.rank",
      low: "r.rank_low",
      high: "r.rank_high",
      whyNotRanked: "r.why_not_ranked",
      of: db.raw(
        "(select count(*)::int from shown.standing_row o where o.standing_id = r.standing_id and o.rank is not null)",
      ),
    });
}

export interface SpecimenRow {
  number: number;
  material: string;
  layerHeightMm: number | null;
  nozzleMm: number | null;
  infillPercent: number | null;
  walls: number | null;
  note: string;
}

/** Printed copies that were measured, by id. */
export async function shownSpecimens(
  db: Handle,
  { specimenIds }: { specimenIds: readonly string[] },
): Promise<SpecimenRow[]> {
  return db("shown.specimen")
    .whereIn("id", [...specimenIds])
    .orderBy("number")
    .select({
      number: "number",
      material: "material",
      layerHeightMm: "layer_height_mm",
      nozzleMm: "nozzle_mm",
      infillPercent: "infill_percent",
      walls: "walls",
      note: "note",
    });
}

export interface AttachmentRow {
  attachmentId: string;
  fileId: string;
  name: string;
  role: string;
  bytes: number;
  sha256: string;
  takenDownAt: Date | null;
  reason: string | null;
}

/** Files of a public revision in their order; those taken down keep name, hash, date and reason. */
export async function shownAttachments(db: Handle, { revisionId }: { revisionId: string }): Promise<AttachmentRow[]> {
  return db("shown.attachment").where({ revision_id: revisionId }).orderBy(["ordinal", "id"]).select({
    attachmentId: "id",
    fileId: "file_id",
    name: "name",
    role: "role",
    bytes: "bytes",
    sha256: "sha256",
    takenDownAt: "taken_down_at",
    reason: "reason",
  });
}
