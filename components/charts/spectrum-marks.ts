import { toneName, type ToneOrders } from "@/lib/format/tones";
import type { ReportedTone } from "@/lib/science/acoustics/sound-report";
import type { SpectrumBand, SpectrumTone } from "./spectrum-model";

const isFundamental = ({ kind, m1, m2 }: ToneOrders): boolean =>
  kind === "blade-passing" && Math.abs(m1) + Math.abs(m2) === 1;

const shortName = (kind: ToneOrders["kind"]): string =>
  kind === "blade-passing" ? "blade passing" : "rotor interaction";

/** Tones found that were predicted, as the chart marks them; prominent ones and the first blade passing are named. */
export function markedTones(tones: readonly ReportedTone[], stages: number): SpectrumTone[] {
  return tones.flatMap(({ match, frequencyHz, prominent }): SpectrumTone[] => {
    if (!match) return [];
    const named = prominent === true || isFundamental(match);
    const name = named ? toneName(match, stages) : shortName(match.kind);
    return [{ frequencyHz, kind: match.kind, name, named, prominent: prominent === true }];
  });
}

/** Bands for the chart: with the background taken out where one was read, else as read. dB. */
export function chartBands(
  bands: readonly {
    nominalHz: number;
    levelDb: number | null;
    correctedDb: number | null;
    upperBound: boolean | null;
  }[],
): SpectrumBand[] {
  return bands.map(({ nominalHz, levelDb, correctedDb, upperBound }) => ({
    nominalHz,
    levelDb: correctedDb ?? levelDb ?? undefined,
    bound: upperBound ?? false,
    why: "not measured",
  }));
}
