import { formatNumber } from "@/lib/format/numbers";
import { listWords } from "@/lib/format/words";
import type { BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";

export type SpectrumBand = {
  /** Nominal mid-band frequency in Hz, as the band is called. */
  nominalHz: number;
  /** Band level in dB; undefined where it is missing, with why. */
  levelDb: number | undefined;
  why?: string;
};

export type PredictedTone = {
  frequencyHz: number;
  kind: "blade-passing" | "interaction";
  /** "blade passing, stage 1". */
  name: string;
};

export type BandTones = { solid: boolean; hatched: boolean; names: string[] };

/** Upper edge over mid-band of a third-octave band: 10^(1/20) (IEC 61260-1:2014, 5.2 to 5.5, value from memory). */
const halfBand = 10 ** 0.05;

/** Which band a frequency in Hz falls into, or undefined outside all; nominal mid-bands lie within 1 % of the exact. */
export function bandOf(bands: readonly SpectrumBand[], frequencyHz: number): number | undefined {
  const index = bands.findIndex(({ nominalHz }) => {
    const exactHz = 1000 * 10 ** (Math.round(10 * Math.log10(nominalHz / 1000)) / 10);
    return frequencyHz >= exactHz / halfBand && frequencyHz < exactHz * halfBand;
  });
  return index < 0 ? undefined : index;
}

/** For each band, in its order, the predicted tones that fall into it. */
export function tonesByBand(bands: readonly SpectrumBand[], tones: readonly PredictedTone[]): BandTones[] {
  const found = bands.map((): BandTones => ({ solid: false, hatched: false, names: [] }));
  for (const tone of tones) {
    const index = bandOf(bands, tone.frequencyHz);
    const band = index === undefined ? undefined : found[index];
    if (!band) continue;
    if (tone.kind === "blade-passing") band.solid = true;
    else band.hatched = true;
    band.names.push(`${formatNumber(tone.frequencyHz)} Hz ${tone.name}`);
  }
  return found;
}

/** "31.5", "1k", "6.3k": a band's name on the axis. */
export function bandName(nominalHz: number): string {
  return nominalHz < 1000 ? String(nominalHz) : `${nominalHz / 1000}k`;
}

/** One sentence for those who hear the chart. */
export function spectrumSummary(bands: readonly SpectrumBand[], tones: readonly PredictedTone[], unit: string): string {
  const known = bands.filter((band) => band.levelDb !== undefined);
  const loudest = known.toSorted((a, b) => (b.levelDb ?? 0) - (a.levelDb ?? 0))[0];
  if (!loudest) return "No band of the spectrum was measured.";
  const level = formatNumber(loudest.levelDb ?? 0, { decimals: 1 });
  const said = listWords(tones.map((tone) => `${tone.name} at ${formatNumber(tone.frequencyHz)} Hz`));
  return `The loudest third-octave band is ${bandName(loudest.nominalHz)} Hz with ${level} ${unit}. ${
    said === "" ? "No tones are predicted." : `Predicted: ${said}.`
  }`;
}

/** The chart's figures as a table, a row a band. */
export function spectrumTable(
  bands: readonly SpectrumBand[],
  tones: readonly PredictedTone[],
  unit: string,
): { caption: string; columns: BarsColumn[]; rows: BarsRow[] } {
  const byBand = tonesByBand(bands, tones);
  return {
    caption: "Third-octave bands, the chart’s figures",
    columns: [
      { key: "band", head: "Band", unit: "Hz" },
      { key: "level", head: "Level", unit },
      { key: "tones", head: "Predicted tones" },
    ],
    rows: bands.map((band, index) => ({
      key: String(band.nominalHz),
      cells: {
        band: { words: bandName(band.nominalHz), sortBy: band.nominalHz },
        level: { figure: { value: band.levelDb, decimals: 1, why: band.why } },
        tones: { words: byBand[index]?.names.join(", ") || "none" },
      },
    })),
  };
}
