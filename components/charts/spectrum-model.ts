import { formatNumber } from "@/lib/format/numbers";
import { listWords } from "@/lib/format/words";
import type { BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";

export type SpectrumBand = {
  /** Nominal mid-band frequency in Hz, as the band is called. */
  nominalHz: number;
  /** Band level in dB; undefined where it is missing, with why. */
  levelDb: number | undefined;
  /** The level is only an upper bound. */
  bound?: boolean;
  why?: string;
};

export type SpectrumTone = {
  frequencyHz: number;
  kind: "blade-passing" | "interaction";
  /** "blade passing, stage 1". */
  name: string;
  /** Named over its bar; the table names every tone. */
  named?: boolean;
  prominent?: boolean;
};

/** A spectrum that is laid over another: the baseline's, or one of several designs'. */
export type SpectrumLine = { key: string; name: string; bands: readonly SpectrumBand[] };

export type BandTones = { solid: boolean; hatched: boolean; names: string[]; labels: string[] };

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

const toneWords = (tone: SpectrumTone): string =>
  `${formatNumber(tone.frequencyHz)} Hz ${tone.name}${tone.prominent ? ", prominent" : ""}`;

/** For each band, in its order, the tones that fall into it. */
export function tonesByBand(bands: readonly SpectrumBand[], tones: readonly SpectrumTone[]): BandTones[] {
  const found = bands.map((): BandTones => ({ solid: false, hatched: false, names: [], labels: [] }));
  for (const tone of tones) {
    const index = bandOf(bands, tone.frequencyHz);
    const band = index === undefined ? undefined : found[index];
    if (!band) continue;
    if (tone.kind === "blade-passing") band.solid = true;
    else band.hatched = true;
    band.names.push(toneWords(tone));
    if (tone.named ?? true) band.labels.push(toneWords(tone));
  }
  return found;
}

/** "31.5", "1k", "6.3k": a band's name on the axis. */
export function bandName(nominalHz: number): string {
  return nominalHz < 1000 ? String(nominalHz) : `${nominalHz / 1000}k`;
}

function loudestBand(bands: readonly SpectrumBand[]): SpectrumBand | undefined {
  return bands.filter((band) => band.levelDb !== undefined).toSorted((a, b) => (b.levelDb ?? 0) - (a.levelDb ?? 0))[0];
}

const levelOf = (band: SpectrumBand): string =>
  `${band.bound ? "at most " : ""}${formatNumber(band.levelDb ?? 0, { decimals: 1 })}`;

/** One sentence for those who hear the chart. */
export function spectrumSummary(
  bands: readonly SpectrumBand[],
  tones: readonly SpectrumTone[],
  unit: string,
  baseline?: SpectrumLine,
): string {
  const loudest = loudestBand(bands);
  if (!loudest) return "No band of the spectrum was measured.";
  const below = baseline && loudestBand(baseline.bands);
  const against = below ? `; of ${baseline.name} it is ${bandName(below.nominalHz)} Hz with ${levelOf(below)}` : "";
  const said = listWords(
    tones
      .filter((tone) => tone.named ?? true)
      .map((tone) => `${tone.name} at ${formatNumber(tone.frequencyHz)} Hz${tone.prominent ? " (prominent)" : ""}`),
  );
  return `The loudest third-octave band is ${bandName(loudest.nominalHz)} Hz with ${levelOf(loudest)} ${unit}${against}. ${
    said === "" ? "No tone stands out." : `Tones: ${said}.`
  }`;
}

/** The chart's figures as a table, a row a band. */
export function spectrumTable(
  bands: readonly SpectrumBand[],
  tones: readonly SpectrumTone[],
  unit: string,
  baseline?: SpectrumLine,
): { caption: string; columns: BarsColumn[]; rows: BarsRow[] } {
  const byBand = tonesByBand(bands, tones);
  return {
    caption: "Third-octave bands, the chart’s figures",
    columns: [
      { key: "band", head: "Band", unit: "Hz" },
      { key: "level", head: "Level", unit },
      ...(baseline ? [{ key: "baseline", head: "Baseline", unit, tone: "baseline" as const }] : []),
      { key: "tones", head: "Tones" },
    ],
    rows: bands.map((band, index) => ({
      key: String(band.nominalHz),
      cells: {
        band: { words: bandName(band.nominalHz), sortBy: band.nominalHz },
        level: bandCell(band),
        ...(baseline && { baseline: bandCell(bandLike(baseline, band)) }),
        tones: { words: byBand[index]?.names.join(", ") || "none" },
      },
    })),
  };
}

const bandLike = ({ bands }: SpectrumLine, { nominalHz }: SpectrumBand): SpectrumBand =>
  bands.find((each) => each.nominalHz === nominalHz) ?? { nominalHz, levelDb: undefined, why: "not measured" };

function bandCell({ levelDb, bound, why }: SpectrumBand) {
  return { figure: { value: levelDb, decimals: 1, bound: bound ? ("upper" as const) : undefined, why } };
}

/** One sentence on several spectra over each other. */
export function spectraSummary(lines: readonly SpectrumLine[], unit: string): string {
  const said = lines.flatMap(({ name, bands }) => {
    const loudest = loudestBand(bands);
    return loudest ? [`${name} in ${bandName(loudest.nominalHz)} Hz with ${levelOf(loudest)} ${unit}`] : [];
  });
  return said.length === 0 ? "No spectrum was measured." : `The loudest third-octave band is, of ${listWords(said)}.`;
}

/** Several spectra as a table, a row a band and a column a line; the last may be the baseline's. */
export function spectraTable(
  lines: readonly SpectrumLine[],
  unit: string,
  baselineKey?: string,
): { caption: string; columns: BarsColumn[]; rows: BarsRow[] } {
  const bands = lines[0]?.bands ?? [];
  return {
    caption: "Third-octave bands of all, the chart’s figures",
    columns: [
      { key: "band", head: "Band", unit: "Hz" },
      ...lines.map(({ key, name }) => ({
        key,
        head: name,
        unit,
        tone: key === baselineKey ? ("baseline" as const) : undefined,
      })),
    ],
    rows: bands.map((band) => ({
      key: String(band.nominalHz),
      cells: {
        band: { words: bandName(band.nominalHz), sortBy: band.nominalHz },
        ...Object.fromEntries(lines.map((line) => [line.key, bandCell(bandLike(line, band))])),
      },
    })),
  };
}
