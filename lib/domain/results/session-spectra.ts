import { correctedBands } from "@/lib/science/acoustics/background-report";
import { RECORDING_BANDS } from "@/lib/science/acoustics/bands";
import { energyMean } from "@/lib/science/acoustics/levels";
import { LOUDNESS_BANDS, stationaryLoudness } from "@/lib/science/acoustics/loudness";
import { rounded, type BandLevel, type ReportedTone } from "@/lib/science/acoustics/sound-report";
import { Refusal } from "@/lib/science/refusal";
import { groupBy } from "../group-by";
import { protocolPositionIds } from "./session-figures";
import type { RunRecord, SessionRecord } from "./session-record";

/** A spectrum that stands: of a run, or of the session's background or calibration at a position. Levels in dB as read. */
export type SpectrumRecord = {
  readonly id: string;
  readonly runId: string | null;
  readonly positionId: string;
  readonly purpose: "run" | "background" | "calibration";
  readonly levelADba: number | null;
  readonly bands: readonly BandLevel[];
  readonly tones: readonly ReportedTone[];
};

/** A band of a set speed: as read, and with the background taken out (null where none was read there). dB. */
export type BandFigure = {
  readonly nominalHz: number;
  readonly midHz: number;
  readonly levelDb: number | null;
  readonly correctedDb: number | null;
  readonly upperBound: boolean | null;
};

/** The spectrum of a subject at a set speed and a microphone position. */
export type SetSpeedSpectrum = {
  readonly setSpeed: number;
  readonly position: string;
  /** Whether the position is one whose level enters the score. */
  readonly ofProtocol: boolean;
  /** Energy mean of the A-weighted levels of the spectra, dB(A); not background-corrected. */
  readonly levelADba: number | null;
  readonly bands: BandFigure[];
  /** Tones of one run: that whose level lies nearest to the mean. Not background-corrected. */
  readonly tones: ReportedTone[];
  readonly tonesOfRunId: string;
  /** From the bands as read, so where the microphone stood; null where a band is missing. */
  readonly loudness: { sone: number; phon: number } | null;
  readonly runs: number;
  readonly spectrumIds: string[];
  readonly backgroundIds: string[];
};

/** By subject (an entry's or a baseline unit's id), in the order of set speed and position. */
export type SessionSpectra = ReadonlyMap<string, readonly SetSpeedSpectrum[]>;

/**
 * The spectra of a session's subjects by set speed and position, from the runs that are done.
 *
 * Bands are energy means over runs (ISO 3744:2010 Eq. (12)); the background of a position is the energy mean of its
 * spectra, and is taken out band by band after the session's grade (ISO 3744:2010 8.2.3, ISO 3746:2010 8.3.3). A band
 * that one run lacks is null. Loudness is stationary, free field (ISO 532-1:2017). Rounded to 1e-9.
 */
export function sessionSpectra(session: SessionRecord, spectra: readonly SpectrumRecord[]): SessionSpectra {
  const runs = new Map(session.runs.flatMap((run) => (run.state === "done" ? [[run.runId, run] as const] : [])));
  const inProtocol = new Set(protocolPositionIds(session));
  const backgrounds = groupBy(
    spectra.filter((each) => each.purpose === "background"),
    (each) => each.positionId,
  );
  const found: { subject: string; spectrum: SetSpeedSpectrum; order: number }[] = [];
  const measured = spectra.flatMap((each) => {
    const run = each.purpose === "run" && each.runId !== null ? runs.get(each.runId) : undefined;
    return run ? [{ run, spectrum: each }] : [];
  });
  const groups = groupBy(measured, ({ run, spectrum }) => `${subjectOf(run)} ${run.setSpeed} ${spectrum.positionId}`);
  for (const group of groups.values()) {
    const [first] = group;
    if (!first) continue;
    const { positionId } = first.spectrum;
    const order = session.positions.findIndex((each) => each.id === positionId);
    const spectrum = setSpeedSpectrum(
      first.run.setSpeed,
      group.map((each) => each.spectrum),
      backgrounds.get(positionId) ?? [],
      session.grade,
    );
    const position = session.positions[order]?.name ?? "";
    const ofProtocol = inProtocol.has(positionId);
    found.push({ subject: subjectOf(first.run), spectrum: rounded({ ...spectrum, position, ofProtocol }), order });
  }
  found.sort((a, b) => a.spectrum.setSpeed - b.spectrum.setSpeed || a.order - b.order);
  const bySubject = groupBy(found, (each) => each.subject);
  return new Map([...bySubject].map(([subject, each]) => [subject, each.map(({ spectrum }) => spectrum)]));
}

const subjectOf = (run: RunRecord): string => run.entryId ?? run.baselineUnitId ?? "";

function setSpeedSpectrum(
  setSpeed: number,
  own: readonly SpectrumRecord[],
  backgrounds: readonly SpectrumRecord[],
  grade: SessionRecord["grade"],
): Omit<SetSpeedSpectrum, "position" | "ofProtocol"> {
  const read = meanBands(own);
  const corrected = correctedBands(read, meanBands(backgrounds), grade);
  const levelADba = meanOf(own.map((each) => each.levelADba));
  const middle = own.reduce((best, each) => (distance(each, levelADba) < distance(best, levelADba) ? each : best));
  return {
    setSpeed,
    levelADba: levelADba ?? null,
    bands: RECORDING_BANDS.map(({ nominalHz, midHz }, i) => ({
      nominalHz,
      midHz,
      levelDb: read[i] ?? null,
      correctedDb: corrected[i]?.levelDb ?? null,
      upperBound: corrected[i]?.upperBound ?? null,
    })),
    tones: [...middle.tones],
    tonesOfRunId: middle.runId ?? "",
    loudness: loudnessOf(read),
    runs: new Set(own.map((each) => each.runId)).size,
    spectrumIds: own.map((each) => each.id).sort(),
    backgroundIds: backgrounds.map((each) => each.id).sort(),
  };
}

function distance(spectrum: SpectrumRecord, meanDba: number | undefined): number {
  return spectrum.levelADba === null || meanDba === undefined ? Infinity : Math.abs(spectrum.levelADba - meanDba);
}

/** Energy means in the order of RECORDING_BANDS; undefined where any of the spectra lacks the band, or there is none. */
function meanBands(spectra: readonly SpectrumRecord[]): (number | undefined)[] {
  return RECORDING_BANDS.map(({ nominalHz }) =>
    meanOf(spectra.map((each) => each.bands.find((band) => band.nominalHz === nominalHz)?.levelDb ?? null)),
  );
}

function meanOf(levels: readonly (number | null)[]): number | undefined {
  const known = levels.filter((level) => level !== null);
  return known.length === levels.length ? energyMean(known) : undefined;
}

function loudnessOf(bandsDb: readonly (number | undefined)[]): SetSpeedSpectrum["loudness"] {
  const known = bandsDb.slice(0, LOUDNESS_BANDS).filter((level) => level !== undefined);
  if (known.length < LOUDNESS_BANDS) return null;
  try {
    return stationaryLoudness(known);
  } catch (error) {
    // Beyond the method's range there is no loudness to tell.
    if (error instanceof Refusal) return null;
    throw error;
  }
}
