import type { SpectrumBand, SpectrumTone } from "@/components/charts/spectrum-model";
import type { Tone } from "@/lib/contracts/publication";
import type { Sheet } from "@/lib/contracts/sheet";
import type { PredictedToneItem, SheetSpectra, SheetSpectrum } from "@/lib/contracts/sheet-spectra";
import { formatNumber } from "@/lib/format/numbers";
import { countWords, listWords } from "@/lib/format/words";

type Orders = Pick<PredictedToneItem, "kind" | "rotor" | "m1" | "m2">;

/** "blade passing, stage 1", "blade passing, stage 2, 3 ×", "rotor interaction 1 f₁ + 2 f₂". */
export function toneName({ kind, rotor, m1, m2 }: Orders, stages: number): string {
  if (kind === "blade-passing") {
    const order = Math.abs(m1) + Math.abs(m2);
    return ["blade passing", stages > 1 ? `stage ${rotor}` : null, order > 1 ? `${order} ×` : null]
      .filter(Boolean)
      .join(", ");
  }
  const parts = [
    { order: m1, name: "f₁" },
    { order: m2, name: "f₂" },
  ].sort((a, b) => Number(a.order < 0) - Number(b.order < 0));
  const [first, second] = parts.map(({ order, name }) => `${formatNumber(Math.abs(order))} ${name}`);
  return `rotor interaction ${first} ${m1 * m2 < 0 ? "−" : "+"} ${second}`;
}

const isFundamental = ({ kind, m1, m2 }: Orders): boolean =>
  kind === "blade-passing" && Math.abs(m1) + Math.abs(m2) === 1;

/** Tones found that were predicted, as the chart marks them; prominent ones and the first blade passing are named. */
export function markedTones(spectrum: SheetSpectrum, stages: number): SpectrumTone[] {
  return spectrum.tones.flatMap((tone): SpectrumTone[] => {
    if (!tone.match) return [];
    const prominent = tone.prominent === true;
    return [
      {
        frequencyHz: tone.frequencyHz,
        kind: tone.match.kind,
        name: prominent || isFundamental(tone.match) ? toneName(tone.match, stages) : shortName(tone.match.kind),
        named: prominent || isFundamental(tone.match),
        prominent,
      },
    ];
  });
}

const shortName = (kind: Orders["kind"]): string => (kind === "blade-passing" ? "blade passing" : "rotor interaction");

/** Bands for the chart: with the background taken out where one was read, else as read. */
export function chartBands({ bands }: Pick<SheetSpectrum, "bands">): SpectrumBand[] {
  return bands.map(({ nominalHz, levelDb, correctedDb, upperBound }) => ({
    nominalHz,
    levelDb: correctedDb ?? levelDb ?? undefined,
    bound: upperBound ?? false,
    why: "not measured",
  }));
}

/** The spectra of a position, by set speed, and which of them the address or the headline level chooses. */
export function chosenSpectrum(
  sheet: Pick<Sheet, "points" | "headlineDba">,
  spectra: SheetSpectra,
  asked: { speed?: number; position?: string },
): { shown: SheetSpectrum; baseline: SheetSpectrum | undefined; speeds: number[]; positions: string[] } | undefined {
  const positions = [...new Set(spectra.entry.map((each) => each.position))];
  const first = spectra.entry.find((each) => each.ofProtocol) ?? spectra.entry[0];
  const position = positions.find((each) => each === asked.position) ?? first?.position;
  const here = spectra.entry.filter((each) => each.position === position);
  const levelAt = (setSpeed: number) =>
    sheet.points.find((point) => point.setSpeed === setSpeed)?.levelDba.value ?? Infinity;
  const offHeadline = (each: SheetSpectrum) => Math.abs(levelAt(each.setSpeed) - sheet.headlineDba);
  const shown =
    here.find((each) => each.setSpeed === asked.speed) ??
    here.toSorted((a, b) => offHeadline(a) - offHeadline(b) || a.setSpeed - b.setSpeed)[0];
  if (!shown) return undefined;
  return {
    shown,
    baseline: spectra.baseline.find((each) => each.position === position && each.setSpeed === shown.setSpeed),
    speeds: here.map((each) => each.setSpeed),
    positions,
  };
}

/** "yes", "no", or why it can't be told. */
export function prominentWords({ prominent, frequencyHz }: Tone): string {
  if (prominent !== null) return prominent ? "yes" : "no";
  return frequencyHz < 89.1 ? "not assessable below 89.1 Hz" : "not assessable";
}

/** "Two tones are prominent: 210 Hz blade passing and …". */
export function prominentSentence(spectrum: SheetSpectrum, stages: number): string {
  const prominent = spectrum.tones.filter((tone) => tone.prominent === true);
  if (prominent.length === 0) return "No tone is prominent.";
  const names = prominent.map(
    (tone) =>
      `${formatNumber(tone.frequencyHz)} Hz ${tone.match ? toneName(tone.match, stages) : "(no prediction fits)"}`,
  );
  const many = names.length > 1;
  return `${countWords(names.length, "tone")} ${many ? "are" : "is"} prominent: ${listWords(names)}.`;
}
