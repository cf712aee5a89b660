import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsRow } from "@/components/ui/bars/bars-model";
import { formatQuantity } from "@/lib/format/quantities";
import { prominentWords, toneName } from "@/lib/format/tones";
import { listWords } from "@/lib/format/words";
import type { ReportedTone } from "@/lib/science/acoustics/sound-report";

function toneRow(tone: ReportedTone, stages: number): BarsRow {
  const { match } = tone;
  const also = match?.alsoMatches.map((each) => toneName(each, stages)) ?? [];
  return {
    key: String(tone.frequencyHz),
    cells: {
      frequency: {
        words: (
          <span className="figures whitespace-nowrap">{formatQuantity(tone.frequencyHz, "Hz", { decimals: 1 })}</span>
        ),
        sortBy: tone.frequencyHz,
      },
      level: { figure: { value: tone.levelDb, decimals: 1 } },
      ratio: { figure: { value: tone.toneToNoiseDb, decimals: 1, signed: true, why: "no noise beside it" } },
      prominence: { figure: { value: tone.prominenceDb, decimals: 1, signed: true, why: "beyond the recording" } },
      prominent: { words: tone.prominent ? <strong>{prominentWords(tone)}</strong> : prominentWords(tone) },
      match: {
        words: match
          ? `${toneName(match, stages)}${also.length > 0 ? `; also ${listWords(also)}` : ""}`
          : "none: no prediction fits",
      },
      residual: { figure: { value: match?.residualHz, decimals: 1, signed: true, why: "no prediction fits" } },
    },
  };
}

/** Tones found, in rising frequency, each with its ratios and the prediction that it fits. */
export function TonesTable({
  tones,
  stages,
  unit,
  caption,
}: {
  tones: readonly ReportedTone[];
  /** Rotors in all. */
  stages: number;
  unit: string;
  caption: string;
}) {
  return (
    <BarsTable
      caption={caption}
      phone="fold"
      columns={[
        { key: "frequency", head: "Frequency" },
        { key: "level", head: "Level", unit },
        { key: "ratio", head: "Tone to noise", unit: "dB" },
        { key: "prominence", head: "Prominence", unit: "dB" },
        { key: "prominent", head: "Prominent" },
        { key: "match", head: "Fits" },
        { key: "residual", head: "Residual", unit: "Hz" },
      ]}
      rows={tones.map((tone) => toneRow(tone, stages))}
    />
  );
}
