import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsRow } from "@/components/ui/bars/bars-model";
import type { Tone } from "@/lib/contracts/publication";
import type { PredictedToneItem, SheetSpectrum } from "@/lib/contracts/sheet-spectra";
import { listWords } from "@/lib/format/words";
import { prominentWords, toneName } from "./spectrum-words";

function toneRow(tone: Tone, stages: number): BarsRow {
  const { match } = tone;
  const also = match?.alsoMatches.map((each) => toneName(each, stages)) ?? [];
  return {
    key: String(tone.frequencyHz),
    cells: {
      frequency: { figure: { value: tone.frequencyHz, decimals: 1 } },
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
  spectrum,
  stages,
  unit,
  caption,
}: {
  spectrum: SheetSpectrum;
  stages: number;
  unit: string;
  caption: string;
}) {
  return (
    <BarsTable
      caption={caption}
      phone="fold"
      columns={[
        { key: "frequency", head: "Frequency", unit: "Hz" },
        { key: "level", head: "Level", unit },
        { key: "ratio", head: "Tone to noise", unit: "dB" },
        { key: "prominence", head: "Prominence", unit: "dB" },
        { key: "prominent", head: "Prominent" },
        { key: "match", head: "Fits" },
        { key: "residual", head: "Residual", unit: "Hz" },
      ]}
      rows={spectrum.tones.map((tone) => toneRow(tone, stages))}
    />
  );
}

const isHeard = (spectrum: SheetSpectrum, tone: PredictedToneItem): boolean =>
  spectrum.tones.some(({ match }) =>
    [match, ...(match?.alsoMatches ?? [])].some(
      (each) => each?.kind === tone.kind && each.m1 === tone.m1 && each.m2 === tone.m2,
    ),
  );

/** Every tone that blade counts and measured speeds predict, heard or not. */
export function PredictionsTable({ spectrum, stages }: { spectrum: SheetSpectrum; stages: number }) {
  return (
    <BarsTable
      caption="Tones predicted at the speeds measured"
      columns={[
        { key: "frequency", head: "Frequency", unit: "Hz" },
        { key: "name", head: "Tone" },
        { key: "mode", head: "Mode order" },
        { key: "struts", head: "Orders with the struts" },
        { key: "heard", head: "Found" },
      ]}
      rows={spectrum.predicted.map((tone) => ({
        key: `${tone.kind} ${tone.m1} ${tone.m2}`,
        cells: {
          frequency: { figure: { value: tone.frequencyHz, decimals: 1 } },
          name: { words: toneName(tone, stages) },
          mode: { figure: { value: tone.modeOrder, decimals: 0, why: "the sense of rotation is not known" } },
          struts: { words: tone.strutModes === null ? "–" : tone.strutModes.join(", ") || "none" },
          heard: { words: isHeard(spectrum, tone) ? "yes" : "no" },
        },
      }))}
    />
  );
}
