import type { SetSpeedSpectrum, Snapshot } from "@/lib/contracts/publication";
import type { ListedTraits } from "@/db/queries/publishing";

/**
 * The read model's row of an entry, from its snapshot and traits: figures at the headline level and at the highest set
 * speed that both the entry and the baseline ran; loudness at that speed too, at the protocol's first position that has a
 * spectrum. Ranks are written by the standings.
 */
export function publishedRow({
  publicationId,
  snapshot,
  traits,
  at,
}: {
  publicationId: string;
  snapshot: Snapshot;
  traits: ListedTraits;
  at: Date;
}): Record<string, unknown> & { entry_id: string } {
  const against = snapshot.against.at(-1);
  const full = snapshot.points.find((point) => point.setSpeed === against?.setSpeed);
  if (!against || !full) throw new Error(`the entry ${snapshot.entryId} shares no set speed with its baseline`);
  const headline = snapshot.equalNoise.find((reading) => reading.levelDba === snapshot.headlineDba);
  const reached = headline && "ratio" in headline ? headline : undefined;
  const heard = (snapshot.spectra?.entry ?? []).filter((each) => each.ofProtocol);
  const levels = snapshot.points.map((point) => point.level.value);
  return {
    entry_id: snapshot.entryId,
    publication_id: publicationId,
    design_id: snapshot.designId,
    revision_id: snapshot.revisionId,
    season_id: snapshot.seasonId,
    round_id: snapshot.roundId,
    bench_version_id: snapshot.benchVersionId,
    protocol_version_id: snapshot.protocolVersionId,
    baseline_unit_id: snapshot.baselineUnitId,
    method_version: snapshot.methodVersion,
    published_at: at,
    first_published_at: at,
    ...traits,
    headline_dba: snapshot.headlineDba,
    equal_noise_ratio: reached?.ratio.value ?? null,
    u_equal_noise_ratio: reached?.ratio.u ?? null,
    equal_noise_k: reached?.difference.value ?? null,
    u_equal_noise_k: reached?.difference.u ?? null,
    dof_equal_noise_k: reached?.difference.dof ?? null,
    equal_cooling_db: snapshot.equalCooling?.differenceDb.value ?? null,
    u_equal_cooling_db: snapshot.equalCooling?.differenceDb.u ?? null,
    dof_equal_cooling_db: snapshot.equalCooling?.differenceDb.dof ?? null,
    equal_noise_why: headline && "why" in headline ? headline.why : null,
    full_set_speed: full.setSpeed,
    level_full_dba: full.level.value,
    u_level_full_db: full.level.u,
    dof_level_full_db: full.level.dof,
    level_full_bound: full.level.upperBound,
    delta_t_full_k: full.deltaT.value,
    u_delta_t_full_k: full.deltaT.u,
    dof_delta_t_full_k: full.deltaT.dof,
    level_difference_db: against.levelDifferenceDb.value,
    u_level_difference_db: against.levelDifferenceDb.u,
    dof_level_difference_db: against.levelDifferenceDb.dof,
    resistance_ratio: against.resistanceRatio.value,
    u_resistance_ratio: against.resistanceRatio.u,
    dof_resistance_ratio: against.resistanceRatio.dof,
    level_low_dba: Math.min(...levels),
    level_high_dba: Math.max(...levels),
    loudness_sone: heard.find((each) => each.setSpeed === full.setSpeed)?.loudness?.sone ?? null,
    prominent_tone: prominentTone(heard),
  };
}

/** Whether a tone is prominent at any set speed; null where no spectrum stands, so that nobody knows. */
function prominentTone(heard: readonly SetSpeedSpectrum[]): boolean | null {
  return heard.length === 0 ? null : heard.some((each) => each.tones.some((tone) => tone.prominent === true));
}
