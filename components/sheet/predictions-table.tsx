import { BarsTable } from "@/components/ui/bars/bars-table";
import type { PredictedToneItem, SheetSpectrum } from "@/lib/contracts/sheet-spectra";
import { toneName } from "@/lib/format/tones";

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
