import type { BackgroundGrade } from "./levels";
import type { ToneMatch } from "./match-tones";

/** What is told about a recording; the command line prints it and the API and the browser preview give the same. */
export interface SoundReport {
  kind: "sound";
  durationS: number;
  usedS: number;
  disturbed: { fromS: number; toS: number }[];
  sampleRateHz: number;
  levelZDb: number | null;
  levelCDb: number | null;
  levelADba: number | null;
  bands: BandLevel[];
  bandsCorrected: CorrectedBand[] | null;
  background: BackgroundReport | null;
  correctedDba: number | null;
  speedsRpm: number[] | null;
  tones: ReportedTone[];
  loudness: { sone: number; phon: number } | null;
  warnings: Warning[];
}

export interface BandLevel {
  nominalHz: number;
  midHz: number;
  levelDb: number | null;
}

export interface CorrectedBand extends BandLevel {
  marginDb: number | null;
  correctionDb: number | null;
  upperBound: boolean | null;
}

export interface BackgroundReport {
  levelADba: number;
  marginDb: number;
  correctionDb: number;
  upperBound: boolean;
}

export interface ReportedTone {
  frequencyHz: number;
  levelDb: number;
  toneToNoiseDb: number | null;
  prominenceDb: number | null;
  prominent: boolean | null;
  match: (ToneMatch & { alsoMatches: ToneMatch[] }) | null;
}

export interface Warning {
  code: string;
  message: string;
}

export type SoundGrade = Extract<BackgroundGrade, "engineering" | "survey">;

/** Results are stored and compared to 1e-9. */
export function rounded<T>(value: T): T {
  const round = (item: unknown): unknown => {
    if (typeof item === "number") {
      if (!Number.isFinite(item)) return null;
      const near = Math.round(item * 1e9) / 1e9;
      return near === 0 ? 0 : near;
    }
    if (Array.isArray(item)) return item.map(round);
    if (typeof item === "object" && item !== null) {
      return Object.fromEntries(Object.entries(item).map(([key, entry]) => [key, round(entry)]));
    }
    return item;
  };
  return round(value) as T;
}
