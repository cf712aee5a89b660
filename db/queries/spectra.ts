import type { BandLevel, ReportedTone, Warning } from "@/lib/science/acoustics/sound-report";
import type { Handle } from "../client/connect";

export type SpectrumPurpose = "run" | "background" | "calibration";

/** A spectrum as it is stored. Levels in dB, as read, over the used seconds and not background-corrected. */
export interface SpectrumInsert {
  /** Given where rows are made in bulk; else the database makes it. */
  id?: string;
  sessionId: string;
  /** Set for the purpose "run" and for no other. */
  runId: string | null;
  positionId: string;
  purpose: SpectrumPurpose;
  source: "recording" | "bands";
  /** Wanted for a recording. */
  logFileId?: string | null;
  /** Version of the program that read it, from 1. */
  readerVersion: number;
  levelZDb: number | null;
  levelCDb: number | null;
  levelADba: number | null;
  bands: readonly BandLevel[];
  tones: readonly ReportedTone[];
  /** Speeds that the sound tells, rotor 1 first, rpm. */
  speedsRpm?: readonly number[] | null;
  loudness: { sone: number; phon: number } | null;
  durationS: number | null;
  usedS: number | null;
  disturbed?: readonly { fromS: number; toS: number }[];
  warnings?: readonly Warning[];
  supersedes?: string | null;
  reviewId?: string | null;
  correctionId?: string | null;
  /** Wanted where it supersedes another. */
  reason?: string | null;
  byPerson: string;
  at?: Date;
}

/** Adds spectra; none is ever changed. The trigger refuses what a closed session doesn't take. @returns ids in order */
export async function insertSpectra(db: Handle, spectra: readonly SpectrumInsert[]): Promise<string[]> {
  const rows = spectra.map((each) => ({
    ...(each.id !== undefined && { id: each.id }),
    session_id: each.sessionId,
    run_id: each.runId,
    position_id: each.positionId,
    purpose: each.purpose,
    source: each.source,
    log_file_id: each.logFileId ?? null,
    reader_version: each.readerVersion,
    level_z_db: each.levelZDb,
    level_c_db: each.levelCDb,
    level_a_dba: each.levelADba,
    bands: JSON.stringify(each.bands),
    tones: JSON.stringify(each.tones),
    speeds_rpm: each.speedsRpm == null ? null : JSON.stringify(each.speedsRpm),
    loudness_sone: each.loudness?.sone ?? null,
    loudness_phon: each.loudness?.phon ?? null,
    duration_s: each.durationS,
    used_s: each.usedS,
    disturbed: JSON.stringify(each.disturbed ?? []),
    warnings: JSON.stringify(each.warnings ?? []),
    supersedes: each.supersedes ?? null,
    review_id: each.reviewId ?? null,
    correction_id: each.correctionId ?? null,
    reason: each.reason ?? null,
    by_person: each.byPerson,
    ...(each.at !== undefined && { at: each.at }),
  }));
  const ids: string[] = [];
  for (let from = 0; from < rows.length; from += 500) {
    const made: { id: string }[] = await db("spectrum")
      .insert(rows.slice(from, from + 500))
      .returning("id");
    ids.push(...made.map((row) => row.id));
  }
  return ids;
}

export interface SpectrumRow {
  id: string;
  sessionId: string;
  runId: string | null;
  positionId: string;
  purpose: SpectrumPurpose;
  source: "recording" | "bands";
  logFileId: string | null;
  readerVersion: number;
  levelZDb: number | null;
  levelCDb: number | null;
  levelADba: number | null;
  bands: BandLevel[];
  tones: ReportedTone[];
  speedsRpm: number[] | null;
  loudness: { sone: number; phon: number } | null;
  durationS: number | null;
  usedS: number | null;
  disturbed: { fromS: number; toS: number }[];
  warnings: Warning[];
  supersedes: string | null;
  at: Date;
}

/**
 * Spectra of some sessions that stand: those that no other supersedes, by the same rule as readings. One that a
 * correction brought stands once that correction is published, or in the dry run that names it. In the order of their ids.
 */
export async function standingSpectra(
  db: Handle,
  { sessionIds, dryCorrections = [] }: { sessionIds: readonly string[]; dryCorrections?: readonly string[] },
): Promise<SpectrumRow[]> {
  if (sessionIds.length === 0) return [];
  const { rows }: { rows: SpectrumRow[] } = await db.raw(
    `select r.id, r.session_id as "sessionId", r.run_id as "runId", r.position_id as "positionId", r.purpose, r.source,
       r.log_file_id as "logFileId", r.reader_version as "readerVersion", r.level_z_db as "levelZDb", r.level_c_db as "levelCDb",
       r.level_a_dba as "levelADba", r.bands, r.tones, r.speeds_rpm as "speedsRpm",
       case when r.loudness_sone is not null
         then json_build_object('sone', r.loudness_sone, 'phon', r.loudness_phon) end as loudness,
       r.duration_s as "durationS", r.used_s as "usedS", r.disturbed, r.warnings, r.supersedes, r.at
     from spectrum r
     where r.session_id = any (:ids)
       and (r.correction_id is null or r.correction_id = any (:dry) or exists (
         select 1 from correction c where c.id = r.correction_id and c.published_at is not null))
       and not exists (
         select 1 from spectrum n where n.supersedes = r.id
           and (n.correction_id is null or n.correction_id = any (:dry) or exists (
             select 1 from correction c where c.id = n.correction_id and c.published_at is not null)))
     order by r.id`,
    { ids: [...sessionIds], dry: [...dryCorrections] },
  );
  return rows;
}

/** Blade counts that tones are predicted from, rotor 1 first; null where there are more than two rotors or none. */
export interface ToneMakersRow {
  blades: number[];
  rotation: "counter" | "co" | null;
  struts: number | null;
}

/** By id of a revision or of a baseline unit. A baseline's struts are not recorded. */
export async function toneMakers(
  db: Handle,
  { revisionIds, baselineUnitIds }: { revisionIds: readonly string[]; baselineUnitIds: readonly string[] },
): Promise<Map<string, ToneMakersRow>> {
  const { rows }: { rows: (ToneMakersRow & { id: string })[] } = await db.raw(
    `select t.revision_id as id, array_agg(r.blades order by r.position) as blades,
       case when count(*) = 1 then null when t.counter_rotating then 'counter' else 'co' end as rotation, t.struts
     from revision_trait t join rotor r on r.revision_id = t.revision_id
     where t.revision_id = any (:revisionIds) group by t.revision_id having count(*) <= 2
     union all
     select u.id, array[b.blades], null, null from baseline_unit u join baseline b on b.id = u.baseline_id
     where u.id = any (:baselineUnitIds)`,
    { revisionIds: [...revisionIds], baselineUnitIds: [...baselineUnitIds] },
  );
  return new Map(rows.map(({ id, ...makers }) => [id, makers]));
}
