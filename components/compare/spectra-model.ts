import { chartBands } from "@/components/charts/spectrum-marks";
import type { SpectrumBand } from "@/components/charts/spectrum-model";
import type { ComparedHead } from "@/lib/contracts/compare";
import type { SetSpeedSpectrum } from "@/lib/contracts/publication";

export type SpectrumPair = { head: ComparedHead; entry: SetSpeedSpectrum; baseline: SetSpeedSpectrum | undefined };

/** Set speeds at which every entry that has spectra at all has one, rising. */
export function commonSpeeds(heads: readonly ComparedHead[]): number[] {
  const measured = heads.flatMap(({ spectra }) =>
    spectra ? [new Set(spectra.entry.map((each) => each.setSpeed))] : [],
  );
  const [first, ...rest] = measured;
  return [...(first ?? [])].filter((speed) => rest.every((set) => set.has(speed))).sort((a, b) => a - b);
}

/** Each entry's spectrum at a set speed, with that of its own session's baseline; those without are left out. */
export function spectraAt(heads: readonly ComparedHead[], setSpeed: number): SpectrumPair[] {
  return heads.flatMap((head) => {
    const entry = head.spectra?.entry.find((each) => each.setSpeed === setSpeed);
    const baseline = head.spectra?.baseline.find(
      (each) => each.setSpeed === setSpeed && each.position === entry?.position,
    );
    return entry ? [{ head, entry, baseline }] : [];
  });
}

/** Band by band an entry's level less its own baseline's, dB; undefined where either is missing or only a bound. */
export function againstOwnBaseline({ entry, baseline }: SpectrumPair): SpectrumBand[] {
  const below = baseline && chartBands(baseline.bands);
  return chartBands(entry.bands).map(({ nominalHz, levelDb, bound }): SpectrumBand => {
    const other = below?.find((each) => each.nominalHz === nominalHz);
    if (levelDb === undefined || other?.levelDb === undefined)
      return { nominalHz, levelDb: undefined, why: "not measured for both" };
    if (bound || other.bound)
      return { nominalHz, levelDb: undefined, why: "the background was too near to one of them" };
    return { nominalHz, levelDb: levelDb - other.levelDb };
  });
}

/** Loudness in percent of the own baseline's; undefined where either is not known. */
export function loudnessPercent({ entry, baseline }: SpectrumPair): number | undefined {
  if (!entry.loudness || !baseline?.loudness || baseline.loudness.sone === 0) return undefined;
  return (100 * entry.loudness.sone) / baseline.loudness.sone;
}
